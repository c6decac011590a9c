import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { requestedMapping } from '$lib/core/measurements/requestedMapping';
import { measurementMessages } from '$lib/core/messages/measurements';
import { productNotFound } from '$lib/core/messages/review';
import type { OpenDatabase } from '$lib/server/db/client';
import { findMeasurementSet } from '$lib/server/db/findMeasurementSet';
import { findUpload } from '$lib/server/db/findUpload';
import { listSuspects } from '$lib/server/db/listSuspects';
import {
	audit,
	deviceBlock,
	job,
	lot,
	measurementSet,
	product,
	sweepBlock,
	upload,
	verdict
} from '$lib/server/db/schema';
import { exportSet } from '$lib/server/services/exportSet';
import { giveVerdict } from '$lib/server/services/giveVerdict';
import { mapUpload } from '$lib/server/services/mapUpload';
import { openStagedSet, stageBlocks } from '$lib/server/services/stageSet';
import { receiveUpload } from '$lib/server/services/receiveUpload';
import { folderStorage } from '$lib/server/storage/folderStorage';
import { handlers } from '$lib/server/work/handlers';
import { runOpenJobs } from '$lib/server/work/runOpenJobs';
import type { Stores } from '$lib/server/work/stores';
import { SweepTable } from '$lib/core/measurements/sweepTable';
import { demoFiles } from '../../src/tasks/generator/demoFiles';
import { encodeLines } from '../../src/tasks/generator/encodeLines';
import { ENGINEER, insertProduct } from '../factories/acceptedSet';
import { openTestDatabase } from '../factories/testDatabase';

const PART = 'LKT-1130';

let database: OpenDatabase;
let stores: Stores;
let folder: string;

beforeEach(async () => {
	database = await openTestDatabase();
	folder = await mkdtemp(join(tmpdir(), 'platen-files-'));
	stores = { db: database.db, storage: folderStorage(folder) };
	await insertProduct(stores.db, PART);
});

afterEach(async () => {
	database.close();
	await rm(folder, { recursive: true, force: true });
});

async function* bytesOf(text: string): AsyncIterable<Uint8Array> {
	yield await Promise.resolve(new TextEncoder().encode(text));
}

async function* piecesOf(lines: Iterable<string>): AsyncIterable<Uint8Array> {
	for (const piece of encodeLines(lines)) yield await Promise.resolve(piece);
}

/** Uploads a file and lets the first look at it end; answers the upload's id. */
async function uploadFile(text: string | Iterable<string>, fileName = 'lot.csv'): Promise<number> {
	const outcome = await receiveUpload(stores, {
		partNumber: PART,
		fileName,
		body: typeof text === 'string' ? bytesOf(text) : piecesOf(text),
		by: ENGINEER
	});
	if (outcome.status !== 'received') throw new Error(outcome.message);
	await runJobs();
	return outcome.upload;
}

/** A refused import fails its job; what it said is read from the upload. */
async function runJobs(): Promise<void> {
	try {
		await runOpenJobs(stores, handlers);
	} catch {
		await runOpenJobs(stores, handlers);
	}
}

async function map(id: number, said: object = {}) {
	const outcome = await mapUpload(stores, {
		upload: id,
		request: requestedMapping.parse(said),
		by: ENGINEER
	});
	await runJobs();
	return outcome;
}

async function stateOf(id: number) {
	const found = await findUpload(stores.db, id);
	if (found === undefined) throw new Error(`no upload ${id}`);
	return found;
}

async function acceptedSet(id: number) {
	const { set } = await stateOf(id);
	const found = set === null ? undefined : await findMeasurementSet(stores.db, set);
	if (found === undefined) throw new Error(`upload ${id} is no set`);
	return found;
}

const SMALL = [
	'lot,wafer,device,T [C],f [MHz],V_R [V],C [pF]',
	'A,1,D1,25,1,0,38.5',
	'A,1,D1,25,1,4,13.75',
	'A,1,D2,25,1,0,38.625',
	'A,1,D2,25,1,4,13.875',
	''
].join('\n');

describe('a generated lot', () => {
	it('goes from upload to an accepted set with its counts, lots and distributions', async () => {
		const [file] = demoFiles();
		if (file === undefined) throw new Error('no demo file');
		const id = await uploadFile(file.lines(), file.fileName);
		expect((await stateOf(id)).state).toBe('read');

		expect((await map(id)).status).toBe('mapped');

		const set = await acceptedSet(id);
		// 4 wafers × 25 devices, 3 temperatures, 33 biases.
		expect(set.counts).toMatchObject({
			lots: 1,
			wafers: 4,
			devices: 100,
			sweeps: 300,
			points: 9900,
			skippedLines: 0,
			comments: 0,
			repeatability: null
		});
		expect(set.counts.conditions.map(({ conditionKey, biases }) => [conditionKey, biases])).toEqual(
			[
				['T=-40;f=1000000', 33],
				['T=25;f=1000000', 33],
				['T=85;f=1000000', 33]
			]
		);
		const lots = await stores.db.select().from(lot);
		expect(lots.map(({ name, waferLot }) => [name, waferLot])).toEqual([['LK24-031', 'LK24-031']]);
		const [owner] = await stores.db.select().from(product);
		expect(owner?.basisHash).toMatch(/^[0-9a-f]{64}$/);
	});

	it('leaves its lost contact in quarantine and nothing else', async () => {
		const [file] = demoFiles();
		const id = await uploadFile(file?.lines() ?? []);
		await map(id);

		const suspects = await listSuspects(stores.db, (await acceptedSet(id)).id);
		expect(
			suspects.map(({ lot: of, wafer, name, conditionKey, reasons }) => [
				of,
				wafer,
				name,
				conditionKey,
				reasons.map(({ rule }) => rule)
			])
		).toEqual([['LK24-031', '07', 'D011', 'T=25;f=1000000', ['outlier']]]);
	});

	it('comes back to the last digit, line by line', async () => {
		const [file] = demoFiles();
		const id = await uploadFile(file?.lines() ?? []);
		await map(id);

		let text = '';
		for await (const piece of exportSet(stores.db, (await acceptedSet(id)).id)) text += piece;
		const numbersOf = (fields: readonly string[]) => fields.map(Number);
		const [, ...exported] = text.trimEnd().split('\n');
		const [, ...given] = [...(file?.lines() ?? [])];
		const asKeys = (lines: readonly string[], at: readonly number[]) =>
			lines
				.map((line) => line.split(','))
				.map((fields) => [...fields.slice(0, 3), ...at.map((position) => fields[position])])
				.map((fields) => [...fields.slice(0, 4), ...numbersOf(fields.slice(4).map(String))].join())
				.sort();
		// The exported file has a column more, the element, before the device.
		expect(asKeys(exported, [4, 5, 6, 7, 8])).toEqual(asKeys(given, [3, 4, 5, 6, 7]));
	});
});

describe('receiving', () => {
	it('refuses the same bytes a second time and names the first upload', async () => {
		const first = await uploadFile(SMALL, 'first.csv');
		const again = await receiveUpload(stores, {
			partNumber: PART,
			fileName: 'second.csv',
			body: bytesOf(SMALL),
			by: ENGINEER
		});
		expect(again).toMatchObject({
			status: 'refused',
			why: 'duplicate',
			earlier: { upload: first, partNumber: PART }
		});
		expect(await stores.db.select().from(upload)).toHaveLength(1);
	});

	it('refuses a file beyond the limit, an empty one, one without a name and an unknown product', async () => {
		const receive = (said: { partNumber?: string; fileName?: string; text?: string }) =>
			receiveUpload(stores, {
				partNumber: said.partNumber ?? PART,
				fileName: said.fileName ?? 'a.csv',
				body: bytesOf(said.text ?? SMALL),
				by: ENGINEER,
				limit: 1000
			});
		expect(await receive({ text: 'x'.repeat(1001) })).toMatchObject({
			why: 'tooLarge',
			message: measurementMessages.fileTooLarge(1000)
		});
		expect(await receive({ text: '' })).toMatchObject({ why: 'empty' });
		expect(await receive({ fileName: '../' })).toMatchObject({ why: 'noName' });
		expect(await receive({ partNumber: 'LKT-9999' })).toMatchObject({
			why: 'noProduct',
			message: productNotFound('LKT-9999')
		});
		expect(await stores.db.select().from(upload)).toEqual([]);
	});

	it('keeps only the last part of a path as the name, and writes who uploaded it down', async () => {
		const id = await uploadFile(SMALL, 'C:\\probe\\lot a.csv');
		expect((await stateOf(id)).fileName).toBe('lot a.csv');
		const [entry] = await stores.db.select().from(audit).where(eq(audit.action, 'upload.receive'));
		expect(entry?.by).toBe(ENGINEER);
	});

	it.each([
		['1,2\n\u00003,4\n', measurementMessages.notText()],
		['nothing\nto be\nmeasured\n', measurementMessages.notATable()]
	])('refuses %j with the reason', async (text, message) => {
		const id = await uploadFile(text);
		const found = await stateOf(id);
		expect(found.state).toBe('refused');
		expect(found.problems?.message).toBe(message);
		expect(await map(id)).toMatchObject({
			status: 'refused',
			message: measurementMessages.cannotBeRead()
		});
	});
});

describe('mapping', () => {
	it('refuses while the header leaves a unit open, and takes it when it is said', async () => {
		const id = await uploadFile(SMALL.replace('C [pF]', 'C'));
		const columns = [
			{ header: 'lot', meaning: 'lot' },
			{ header: 'wafer', meaning: 'wafer' },
			{ header: 'device', meaning: 'device' },
			{ header: 'T [C]', meaning: 'temperature', unit: '°C' },
			{ header: 'f [MHz]', meaning: 'frequency', unit: 'MHz' },
			{ header: 'V_R [V]', meaning: 'bias', unit: 'V' }
		];
		const capacitance = { header: 'C', meaning: 'capacitance' };

		expect(await map(id)).toMatchObject({
			status: 'refused',
			messages: [measurementMessages.unitMissing('C')]
		});
		expect(await map(id, { columns: [...columns, { ...capacitance, unit: 'V' }] })).toMatchObject({
			status: 'refused',
			messages: [measurementMessages.unitMissing('C')]
		});
		expect((await stateOf(id)).state).toBe('read');

		await map(id, { columns: [...columns, { ...capacitance, unit: 'nF' }] });
		const [block] = await stores.db.select().from(sweepBlock);
		expect(block?.unitScale).toBe(1e-9);
	});

	it('refuses a second mapping of an accepted upload', async () => {
		const id = await uploadFile(SMALL);
		await map(id);
		expect(await map(id)).toMatchObject({
			status: 'refused',
			message: measurementMessages.alreadyAccepted()
		});
	});
});

describe('lines that can’t be used', () => {
	const BAD = `${SMALL}A,1,D3,25,1,0,open\nA,1,D3,25,1,4,0\nA,1,D3,25,1,4\n`;

	it('refuse the file with their numbers, what was read and why', async () => {
		const id = await uploadFile(BAD);
		await map(id);
		const found = await stateOf(id);
		expect(found.state).toBe('refused');
		expect(found.problems).toEqual({
			message: null,
			total: 3,
			lines: [
				{
					line: 6,
					read: 'A,1,D3,25,1,0,open',
					message: measurementMessages.notANumber('capacitance', 'open')
				},
				{
					line: 7,
					read: 'A,1,D3,25,1,4,0',
					message: measurementMessages.capacitanceNotPositive('0')
				},
				{ line: 8, read: 'A,1,D3,25,1,4', message: measurementMessages.fieldCount(7, 6) }
			]
		});
		expect(await stores.db.select().from(measurementSet)).toEqual([]);
	});

	it('are left out when a person agrees to exactly so many', async () => {
		const id = await uploadFile(BAD);
		await map(id, { skipLines: 2 });
		expect((await stateOf(id)).problems?.message).toBe(measurementMessages.skipCountDiffers(2, 3));

		await map(id, { skipLines: 3 });
		expect((await acceptedSet(id)).counts).toMatchObject({
			devices: 2,
			points: 4,
			skippedLines: 3
		});
	});
});

describe('wafer lots', () => {
	it('are refused when they contradict what is known of a lot', async () => {
		await map(await uploadFile(SMALL));
		const id = await uploadFile(SMALL.replace('38.5', '38.75'));
		await map(id, { setup: { waferLots: [{ lot: 'A', waferLot: 'W7' }] } });
		expect((await stateOf(id)).problems?.message).toBe(
			measurementMessages.waferLotDiffers('A', 'A', 'W7')
		);
	});
});

describe('verdicts', () => {
	async function quarantined() {
		const [file] = demoFiles();
		const id = await uploadFile(file?.lines() ?? []);
		await map(id);
		const { id: set } = await acceptedSet(id);
		const [sweep] = await listSuspects(stores.db, set);
		if (sweep === undefined) throw new Error('nothing is suspect');
		return { set, device: sweep.device, conditionKey: sweep.conditionKey, by: ENGINEER };
	}
	const basisOf = async () => (await stores.db.select().from(product))[0]?.basisHash;

	it('keep or exclude a sweep, have the distributions computed again, and are undone by another', async () => {
		const sweep = await quarantined();
		const waiting = await basisOf();

		const kept = await giveVerdict(stores, {
			...sweep,
			decision: 'keep',
			reason: 'measured again'
		});
		expect(kept.status).toBe('given');
		await runJobs();
		expect(await basisOf()).not.toBe(waiting);

		await giveVerdict(stores, { ...sweep, decision: 'exclude', reason: 'lost contact' });
		await runJobs();
		const [listed] = await listSuspects(stores.db, sweep.set);
		expect(
			listed?.verdicts.map(({ decision, reason, byName }) => [decision, reason, byName])
		).toEqual([
			['keep', 'measured again', 'Ida Sandvik'],
			['exclude', 'lost contact', 'Ida Sandvik']
		]);
	});

	it('need a reason, a suspect, a set, and a decision that changes something', async () => {
		const sweep = await quarantined();
		const give = (said: object) =>
			giveVerdict(stores, { ...sweep, decision: 'exclude', reason: 'lost contact', ...said });
		expect(await give({ reason: '  ' })).toEqual({
			status: 'refused',
			message: measurementMessages.reasonNeeded()
		});
		expect(await give({ device: sweep.device + 1 })).toEqual({
			status: 'refused',
			message: measurementMessages.notSuspect()
		});
		expect(await give({ set: 99 })).toEqual({
			status: 'refused',
			message: measurementMessages.setNotFound(99)
		});
		await give({});
		expect(await give({})).toEqual({
			status: 'refused',
			message: measurementMessages.verdictUnchanged('exclude')
		});
		expect(await stores.db.select().from(verdict)).toHaveLength(1);
	});
});

describe('an import that broke off', () => {
	it('leaves nothing behind once it is tried again', async () => {
		const id = await uploadFile(SMALL);
		await mapUpload(stores, { upload: id, request: requestedMapping.parse({}), by: ENGINEER });
		const table = new SweepTable();
		table
			.condition(25, 1e6)
			?.add(
				table.deviceIndex({ lot: 'B', wafer: '1', site: '', element: '', name: 'D9' }),
				0,
				1,
				0
			);
		const set = await openStagedSet(stores.db, { upload: await stateOf(id), by: ENGINEER });
		await stageBlocks(stores.db, {
			set,
			table,
			unitScale: 1e-12,
			job: { id: 0, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
		});
		expect(await stores.db.select().from(deviceBlock)).toHaveLength(1);

		await runJobs();

		const sets = await stores.db.select().from(measurementSet);
		expect(sets.map(({ state }) => state)).toEqual(['accepted']);
		const blocks = await stores.db.select().from(deviceBlock);
		expect(blocks.map(({ devices }) => devices)).toEqual([
			{
				lot: ['A', 'A'],
				wafer: ['1', '1'],
				site: ['', ''],
				element: ['', ''],
				name: ['D1', 'D2']
			}
		]);
		expect(await stores.db.select().from(sweepBlock)).toHaveLength(1);
	});

	it('accepts nothing when a newer attempt is at work', async () => {
		const id = await uploadFile(SMALL);
		await mapUpload(stores, { upload: id, request: requestedMapping.parse({}), by: ENGINEER });
		await handlers['import-measurement-set']?.(
			stores,
			{ upload: id, by: ENGINEER },
			{ id: 0, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(false) }
		);
		expect((await stateOf(id)).state).toBe('mapped');
		const queued = await stores.db.select().from(job).where(eq(job.kind, 'compute-distributions'));
		expect(queued).toEqual([]);
	});
});
