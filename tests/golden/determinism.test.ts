import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { tmpdir } from 'node:os';
import { resolve } from 'node:path';
import { expect, it } from 'vitest';
import { renderDatasheet } from '../../src/lib/server/pdf/renderDatasheet';
import { PACKAGES } from '../../src/lib/core/outline/packages';
import { rendererVersion } from '../../src/lib/server/pdf/rendererVersion';
import { completeSheet, listedRecord } from './completeSheet';
import { draftRecord, releaseRecord, tuningDiode } from './sampleDatasheets';

/**
 * SHA-256 of three files by the version of the renderer. Whoever changes the bytes raises
 * `rendererVersion` and adds its hashes: a stored PDF is healed only by the version that made it.
 */
const GOLDEN: Readonly<Record<string, Readonly<Record<string, string>>>> = {
	'platen-pdf-2': {
		release: 'bf79f95ba1fa9492f2cd28b601297735ea164fcc99eed8c7ffd5b948fbd463bd',
		complete: '7970c390ded25d6221890272488c02a4d3e18c6d6a41aace9b8ae914c4f1c3ed',
		proof: '283146f35768ab7a3198f86ae113a20f260b162f8ed25c4f1799102fb51b3e11'
	}
};

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const script = resolve(import.meta.dirname, 'renderSample.mjs');

const elsewhere = (zone: string) =>
	execFileSync(process.execPath, [script], {
		encoding: 'utf8',
		cwd: tmpdir(),
		env: { ...process.env, TZ: zone, LANG: 'de_DE.UTF-8' }
	});

it('the same document and record give the same bytes in any process, folder and time zone', async () => {
	const here = [
		sha256(await renderDatasheet(tuningDiode(), releaseRecord)),
		sha256(await renderDatasheet(completeSheet(), listedRecord))
	];
	expect(elsewhere('Pacific/Auckland').trim().split('\n')).toEqual(here);
	expect(elsewhere('America/St_Johns').trim().split('\n')).toEqual(here);
}, 120_000);

it('gives bytes that change only with the version of the renderer', async () => {
	const made = {
		release: sha256(await renderDatasheet(tuningDiode(), releaseRecord)),
		complete: sha256(await renderDatasheet(completeSheet(), listedRecord)),
		proof: sha256(await renderDatasheet(tuningDiode({ isUnfinished: true }), draftRecord))
	};
	expect(made, `hashes kept of ${rendererVersion}`).toEqual(GOLDEN[rendererVersion]);
}, 60_000);

it('a process that has drawn ten other sheets gives the bytes of a cold one', async () => {
	const first = sha256(await renderDatasheet(tuningDiode(), releaseRecord));
	for (let other = 0; other < 10; other++)
		await renderDatasheet(
			completeSheet({
				partNumber: `LKT-200${other}`,
				packageName: PACKAGES[other % 6]?.name ?? ''
			}),
			listedRecord
		);
	expect(sha256(await renderDatasheet(tuningDiode(), releaseRecord))).toBe(first);
}, 60_000);

it('another number, another version or another date give other bytes', async () => {
	const first = sha256(await renderDatasheet(tuningDiode(), releaseRecord));
	const others = await Promise.all([
		renderDatasheet({ ...tuningDiode(), partNumber: 'LKT-1131' }, releaseRecord),
		renderDatasheet(tuningDiode(), { ...releaseRecord, version: { major: 2, minor: 1 } }),
		renderDatasheet(tuningDiode(), { ...releaseRecord, date: '2026-11-17' })
	]);
	expect(new Set([first, ...others.map(sha256)]).size).toBe(4);
});
