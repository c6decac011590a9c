import { createHash } from 'node:crypto';
import { resolve } from 'node:path';
import { runnerImport } from 'vite';

/** Renders the sample in a process of its own and prints the hash of the file. */
const load = async (file) =>
	(await runnerImport(resolve(import.meta.dirname, file), { configFile: false, logLevel: 'error' }))
		.module;
const { renderDatasheet } = await load('../../src/lib/server/pdf/renderDatasheet.ts');
const { tuningDiode, releaseRecord } = await load('sampleDatasheets.ts');
const bytes = await renderDatasheet(tuningDiode(), releaseRecord);
process.stdout.write(createHash('sha256').update(bytes).digest('hex'));
