import { createHash } from 'node:crypto';
import { resolve } from 'node:path';
import { runnerImport } from 'vite';

/** Renders two samples in a process of its own and prints the hash of each file. */
const load = async (file) =>
	(await runnerImport(resolve(import.meta.dirname, file), { configFile: false, logLevel: 'error' }))
		.module;
const { renderDatasheet } = await load('../../src/lib/server/pdf/renderDatasheet.ts');
const { tuningDiode, releaseRecord } = await load('sampleDatasheets.ts');
const { completeSheet, listedRecord } = await load('completeSheet.ts');
const sheets = [
	[tuningDiode(), releaseRecord],
	[completeSheet(), listedRecord]
];
for (const [document, record] of sheets) {
	const bytes = await renderDatasheet(document, record);
	process.stdout.write(`${createHash('sha256').update(bytes).digest('hex')}\n`);
}
