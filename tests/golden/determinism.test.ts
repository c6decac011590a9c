import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { tmpdir } from 'node:os';
import { resolve } from 'node:path';
import { expect, it } from 'vitest';
import { renderDatasheet } from '../../src/lib/server/pdf/renderDatasheet';
import { releaseRecord, tuningDiode } from './sampleDatasheets';

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const script = resolve(import.meta.dirname, 'renderSample.mjs');

const elsewhere = (zone: string) =>
	execFileSync(process.execPath, [script], {
		encoding: 'utf8',
		cwd: tmpdir(),
		env: { ...process.env, TZ: zone, LANG: 'de_DE.UTF-8' }
	});

it('the same document and record give the same bytes in any process, folder and time zone', async () => {
	const here = sha256(await renderDatasheet(tuningDiode(), releaseRecord));
	expect(elsewhere('Pacific/Auckland')).toBe(here);
	expect(elsewhere('America/St_Johns')).toBe(here);
}, 120_000);

it('a warm process gives the bytes of a cold one', async () => {
	const first = sha256(await renderDatasheet(tuningDiode(), releaseRecord));
	await renderDatasheet(tuningDiode({ partNumber: 'LKT-2000' }), releaseRecord);
	expect(sha256(await renderDatasheet(tuningDiode(), releaseRecord))).toBe(first);
});

it('another number, another version or another date give other bytes', async () => {
	const first = sha256(await renderDatasheet(tuningDiode(), releaseRecord));
	const others = await Promise.all([
		renderDatasheet({ ...tuningDiode(), partNumber: 'LKT-1131' }, releaseRecord),
		renderDatasheet(tuningDiode(), { ...releaseRecord, version: { major: 2, minor: 1 } }),
		renderDatasheet(tuningDiode(), { ...releaseRecord, date: '2026-11-17' })
	]);
	expect(new Set([first, ...others.map(sha256)]).size).toBe(4);
});
