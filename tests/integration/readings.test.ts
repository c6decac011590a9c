import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { findCharacteristic } from '$lib/core/characteristics/catalogue';
import { indexDevices } from '$lib/core/distributions/indexDevices';
import { CHUNK } from '$lib/core/measurements/blocks';
import { ReadingTable } from '$lib/core/measurements/readingTable';
import { requestedMapping } from '$lib/core/measurements/requestedMapping';
import { measurementMessages } from '$lib/core/messages/measurements';
import { UNITS } from '$lib/core/units/unit';
import type { OpenDatabase } from '$lib/server/db/client';
import { findMeasurementSet } from '$lib/server/db/findMeasurementSet';
import { findUpload } from '$lib/server/db/findUpload';
import { listSuspects } from '$lib/server/db/listSuspects';
import { measurementSet, readingBlock, sweepBlock } from '$lib/server/db/schema';
import { exportSet } from '$lib/server/services/exportSet';
import { giveVerdict } from '$lib/server/services/giveVerdict';
import { mapUpload } from '$lib/server/services/mapUpload';
import { readBasis } from '$lib/server/services/readBasis';
import { readingSeries, readingsOf } from '$lib/server/services/readReadings';
import { readDevices, readSweeps, sweepConditions } from '$lib/server/services/readSweeps';
import { receiveUpload } from '$lib/server/services/receiveUpload';
import { openStagedSet, stageReadings } from '$lib/server/services/stageSet';
import { folderStorage } from '$lib/server/storage/folderStorage';
import { handlers } from '$lib/server/work/handlers';
import { runOpenJobs } from '$lib/server/work/runOpenJobs';
import type { Stores } from '$lib/server/work/stores';
import { ENGINEER, insertProduct } from '../factories/acceptedSet';
import { openTestDatabase } from '../factories/testDatabase';

const PART = 'LKR-2406';

let database: OpenDatabase;
let stores: Stores;
let folder: string;
let product: number;

beforeEach(async () => {
	database = await openTestDatabase();
	folder = await mkdtemp(join(tmpdir(), 'platen-files-'));
	stores = { db: database.db, storage: folderStorage(folder) };
	product = await insertProduct(stores.db, PART);
});

afterEach(async () => {
	database.close();
	await rm(folder, { recursive: true, force: true });
});

async function* bytesOf(text: string): AsyncIterable<Uint8Array> {
	yield await Promise.resolve(new TextEncoder().encode(text));
}

/** Uploads a file and maps it as it was recognised; answers the upload as it stands then. */
async function upload(text: string, said: object = {}) {
	const received = await receiveUpload(stores, {
		partNumber: PART,
		fileName: 'readings.csv',
		body: bytesOf(text),
		by: ENGINEER
	});
	if (received.status !== 'received') throw new Error(received.message);
	await runOpenJobs(stores, handlers);
	const mapped = await mapUpload(stores, {
		upload: received.upload,
		request: requestedMapping.parse(said),
		by: ENGINEER
	});
	if (mapped.status !== 'mapped') throw new Error(mapped.message);
	// A refused import fails its job; what it said is read from the upload.
	await runOpenJobs(stores, handlers).catch(() => runOpenJobs(stores, handlers));
	const found = await findUpload(stores.db, received.upload);
	if (found === undefined) throw new Error('the upload is gone');
	return found;
}

async function acceptedSet(text: string, said: object = {}) {
	const { set, problems } = await upload(text, said);
	const found = set === null ? undefined : await findMeasurementSet(stores.db, set);
	if (found === undefined) throw new Error(JSON.stringify(problems));
	return found;
}

async function exported(set: number): Promise<string> {
	let text = '';
	for await (const piece of exportSet(stores.db, set)) text += piece;
	return text;
}

const HEADER = 'lot,wafer,device,characteristic,T [C],V_R [V],I_F [mA],value,unit,censored';
const LINES = [
	...['12.50', '13.1', '12.9', '11.75', '12.2'].map(
		(value, device) => `A,1,D${device},I_R,25,60,,${value},nA,`
	),
	'A,1,D5,I_R,25,60,,<11.5,nA,',
	'A,1,D6,I_R,25,60,,950.3,nA,',
	'A,1,D0,I_R,25,60,,12.7,nA,',
	'A,1,D0,V_F,25,,2000,0.5123,V,',
	'B,2,D0,V_F,-40,,100,412.1,mV,>'
];
const TEXT = [HEADER, ...LINES, ''].join('\n');

describe('a file of readings', () => {
	it('becomes an accepted set, counted by lot, characteristic and condition', async () => {
		const set = await acceptedSet(TEXT);
		expect(set.counts).toMatchObject({
			lots: 2,
			wafers: 2,
			devices: 8,
			sweeps: 0,
			points: 10,
			suspects: 1,
			skippedLines: 0,
			conditions: [],
			readings: [
				{
					characteristic: 'I_R',
					conditionKey: 'T=25;VR=60',
					unit: 'nA',
					readings: 8,
					censored: 1,
					devices: [7, 0],
					lotsNotJudged: []
				},
				{
					characteristic: 'V_F',
					conditionKey: 'T=-40;IF=0.1',
					unit: 'mV',
					readings: 1,
					censored: 1,
					devices: [0, 1],
					lotsNotJudged: ['B']
				},
				{ characteristic: 'V_F', conditionKey: 'T=25;IF=2', unit: 'V', devices: [1, 0] }
			]
		});
		expect(await stores.db.select().from(sweepBlock)).toEqual([]);
		const blocks = await stores.db.select().from(readingBlock);
		expect(
			blocks.map(({ characteristic, repeat, unitScale }) => [characteristic, repeat, unitScale])
		).toEqual([
			['I_R', 0, 1e-9],
			['I_R', 1, 1e-9],
			['V_F', 0, 1e-3],
			['V_F', 0, 1]
		]);
	});

	it('comes back by export to the last digit, and is accepted again from there', async () => {
		const text = await exported((await acceptedSet(TEXT)).id);
		expect(text.trimEnd().split('\n')).toEqual([
			'lot,wafer,site,element,device,characteristic,temperature_C,frequency_Hz,reverse_voltage_V,forward_current_A,reverse_current_A,pulse_duration_s,current_slope_A/s,value,unit,censored',
			'A,1,,,D0,I_R,25,,60,,,,,12.5,nA,',
			'A,1,,,D1,I_R,25,,60,,,,,13.1,nA,',
			'A,1,,,D2,I_R,25,,60,,,,,12.9,nA,',
			'A,1,,,D3,I_R,25,,60,,,,,11.75,nA,',
			'A,1,,,D4,I_R,25,,60,,,,,12.2,nA,',
			'A,1,,,D5,I_R,25,,60,,,,,11.5,nA,<=',
			'A,1,,,D6,I_R,25,,60,,,,,950.3,nA,',
			'A,1,,,D0,I_R,25,,60,,,,,12.7,nA,',
			'B,2,,,D0,V_F,-40,,,0.1,,,,412.1,mV,>=',
			'A,1,,,D0,V_F,25,,,2,,,,0.5123,V,'
		]);
		expect(await exported((await acceptedSet(text)).id)).toBe(text);
	});

	it('leaves what is unlike its lot in quarantine, where a verdict is given on it', async () => {
		const set = await acceptedSet(TEXT);
		const suspects = await listSuspects(stores.db, set.id);
		expect(
			suspects.map(({ lot, name, conditionKey, reasons }) => [
				lot,
				name,
				conditionKey,
				reasons.map(({ rule }) => rule)
			])
		).toEqual([['A', 'D6', 'I_R T=25;VR=60', ['outlier']]]);

		const { device = 0, conditionKey = '' } = suspects[0] ?? {};
		const leftOut = async () => (await readBasis(stores.db, product))?.inputs.leftOut;
		expect(await leftOut()).toEqual([{ set: set.id, device, conditionKey, why: 'quarantined' }]);
		const outcome = await giveVerdict(stores, {
			set: set.id,
			device,
			conditionKey,
			decision: 'exclude',
			reason: 'lost contact',
			by: ENGINEER
		});
		expect(outcome.status).toBe('given');
		expect(await leftOut()).toEqual([{ set: set.id, device, conditionKey, why: 'excluded' }]);
	});

	it('is refused with every line that can’t be used', async () => {
		const bad = `${TEXT}A,1,D7,I_R,25,60,,0,nA,\nA,1,D8,I_R,25,60,,5,,\nA,1,D8,I_R,25,60,,5,µA,\n`;
		const found = await upload(bad);
		expect(found.state).toBe('refused');
		expect(found.problems).toEqual({
			message: null,
			total: 3,
			lines: [
				{
					line: 12,
					read: 'A,1,D7,I_R,25,60,,0,nA,',
					message: measurementMessages.readingZero('I_R')
				},
				{ line: 13, read: 'A,1,D8,I_R,25,60,,5,,', message: measurementMessages.unitEmpty() },
				{
					line: 14,
					read: 'A,1,D8,I_R,25,60,,5,µA,',
					message: measurementMessages.unitDiffers('I_R', 'nA', 'µA')
				}
			]
		});
	});
});

describe('an import of readings that broke off', () => {
	it('leaves nothing behind once it is tried again', async () => {
		const received = await receiveUpload(stores, {
			partNumber: PART,
			fileName: 'readings.csv',
			body: bytesOf(TEXT),
			by: ENGINEER
		});
		if (received.status !== 'received') throw new Error(received.message);
		await runOpenJobs(stores, handlers);
		const id = received.upload;
		await mapUpload(stores, { upload: id, request: requestedMapping.parse({}), by: ENGINEER });
		const found = await findUpload(stores.db, id);
		const characteristic = findCharacteristic('V_F');
		if (found === undefined || characteristic === undefined) throw new Error('not there');
		const table = new ReadingTable();
		const device = table.devices.indexOf({ lot: 'Z', wafer: '', site: '', element: '', name: 'D' });
		table
			.seriesOf(characteristic, { temperatureCelsius: 25, forwardCurrent: 7 }, UNITS.voltage[0])
			?.add(device, 0.5, 0, 1);
		const set = await openStagedSet(stores.db, { upload: found, by: ENGINEER });
		await stageReadings(stores.db, {
			set,
			table,
			job: { id: 0, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
		});
		const keys = async () =>
			(await stores.db.select().from(readingBlock)).map(({ conditionKey }) => conditionKey);
		expect(await keys()).toEqual(['T=25;IF=7']);

		await runOpenJobs(stores, handlers);
		expect(await keys()).toEqual(['T=25;VR=60', 'T=25;VR=60', 'T=-40;IF=0.1', 'T=25;IF=2']);
		const sets = await stores.db.select().from(measurementSet);
		expect(sets.map(({ state }) => state)).toEqual(['accepted']);
	});
});

describe('readings as values of devices', () => {
	it('are in SI, averaged over repeats, with their flags, in the order of the devices', async () => {
		const { id } = await acceptedSet(TEXT);
		const devices = indexDevices(await readDevices(stores.db, [id]), CHUNK, new Map());
		expect(await readingSeries(stores.db, [id])).toEqual([
			{ characteristic: 'I_R', conditionKey: 'T=25;VR=60' },
			{ characteristic: 'V_F', conditionKey: 'T=-40;IF=0.1' },
			{ characteristic: 'V_F', conditionKey: 'T=25;IF=2' }
		]);

		const of = { characteristic: 'I_R', conditionKey: 'T=25;VR=60', devices };
		const all = await readingsOf(stores.db, [id], of);
		expect([...all.values]).toEqual([
			expect.closeTo(12.6e-9, 20),
			13.1e-9,
			12.9e-9,
			11.75e-9,
			12.2e-9,
			11.5e-9,
			950.3e-9,
			Number.NaN
		]);
		expect([...all.censored]).toEqual([0, 0, 0, 0, 0, -1, 0, 0]);
		expect(all.sets).toEqual([id]);

		const some = await readingsOf(stores.db, [id], { ...of, isLeftOut: (_, row) => row === 6 });
		expect(some.values[6]).toBeNaN();
		expect(await readingSeries(stores.db, [])).toEqual([]);
	});
});

describe('a file of I–V sweeps', () => {
	const SWEEPS = [
		'lot,device,T [C],V [V],I [mA]',
		'A,D1,25,-5,-0.0002',
		'A,D1,25,0.4,12.5',
		'A,D2,25,-5,-0.00025',
		'A,D2,25,0.4,12.75',
		''
	].join('\n');

	it('is stored as sweeps of the current, reverse positive, and comes back', async () => {
		const { id, counts } = await acceptedSet(SWEEPS);
		expect(counts).toMatchObject({
			sweeps: 2,
			points: 4,
			conditions: [{ quantity: 'current', conditionKey: 'T=25', frequency: null, biases: 2 }]
		});
		expect(await sweepConditions(stores.db, [id])).toEqual([]);
		expect(await sweepConditions(stores.db, [id], 'current')).toEqual(['T=25']);
		const matrices = [];
		for await (const matrix of readSweeps(stores.db, [id], 'T=25', 'current'))
			matrices.push(matrix);
		expect(matrices).toEqual([
			{
				set: id,
				firstRow: 0,
				grid: [5, -0.4],
				unitScale: 1e-3,
				values: Float64Array.of(0.0002, -12.5, 0.00025, -12.75)
			}
		]);
		expect(await exported(id)).toBe(
			[
				'lot,wafer,site,element,device,temperature_C,bias_V,current_mA',
				'A,,,,D1,25,5,0.0002',
				'A,,,,D1,25,-0.4,-12.5',
				'A,,,,D2,25,5,0.00025',
				'A,,,,D2,25,-0.4,-12.75',
				''
			].join('\n')
		);
	});
});
