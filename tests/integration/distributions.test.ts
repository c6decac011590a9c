import { and, eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { CHARACTERISTICS } from '$lib/core/characteristics/catalogue';
import { packFlags, packMatrix } from '$lib/core/measurements/blocks';
import { distributionMessages } from '$lib/core/messages/distributions';
import { curveCovariance, momentsOfPair } from '$lib/core/distributions/jointDistribution';
import { lineFromMoments, regressionLine } from '$lib/core/stats/regressionLine';
import type { OpenDatabase } from '$lib/server/db/client';
import { findDistribution } from '$lib/server/db/findDistribution';
import { findDistributions, type InterpolatedWanted } from '$lib/server/db/findDistributions';
import { findJointDistribution } from '$lib/server/db/findJointDistribution';
import { findMeasuredConditions } from '$lib/server/db/findMeasuredConditions';
import { listEnteredDistributions } from '$lib/server/db/listEnteredDistributions';
import { audit, distribution, job, product, readingBlock, verdict } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { enterDistribution } from '$lib/server/services/enterDistribution';
import { ensureTemplates } from '$lib/server/services/ensureTemplates';
import { interpolateNow } from '$lib/server/services/interpolateNow';
import { ENGINEER, insertAcceptedSet, insertProduct } from '../factories/acceptedSet';
import { openTestDatabase } from '../factories/testDatabase';
import { BIASES, columnOf, devices, FREQUENCY, SWEEP_KEY, sweeps } from '../factories/threeLots';
import { unreachableStorage } from '../factories/unreachableStorage';

const at25 = sweeps(7);
let opened: OpenDatabase;
let productId = 0;
let scope = { product: 0, basisHash: '', characteristic: 'C_tot' };

const compute = (payload: object) =>
	computeDistributions(
		{ db: opened.db, storage: unreachableStorage },
		{ product: productId, ...payload },
		{ id: 1, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
	);

const biasesAt = async (interpolated?: InterpolatedWanted) => {
	const found = await findDistributions(opened.db, {
		...scope,
		temperatureCelsius: 25,
		...(interpolated && { interpolated })
	});
	return found.map(({ condition }) => condition.reverseVoltage);
};

beforeAll(async () => {
	opened = await openTestDatabase();
	await ensureTemplates({ db: opened.db }, 'templates');
	productId = await insertProduct(opened.db);
	await insertAcceptedSet(opened.db, {
		product: productId,
		sha256: 'a'.repeat(64),
		uncertainty: 0.003,
		devices,
		biases: BIASES,
		frequency: FREQUENCY,
		picofarads: new Map([[25, at25]])
	});
	await compute({});
	const [owner] = await opened.db.select().from(product).where(eq(product.id, productId));
	scope = { ...scope, product: productId, basisHash: owner?.basisHash ?? '' };
});
afterAll(() => opened.close());

describe('biases between those that were measured', () => {
	// The tuning template asks for 0.5, 1, 2, 3, 4, 6, 8, 10 … 28 V; measured are 0, 1, 4 and 10 V.
	const BETWEEN = [0.5, 2, 3, 6, 8];

	it('have distributions where the template of the class asks for them, found when asked', async () => {
		expect(await biasesAt()).toEqual(BIASES);
		expect(await biasesAt([2, 6, 12])).toEqual([0, 1, 2, 4, 6, 10]);
		expect(await biasesAt('all')).toEqual([...BIASES, ...BETWEEN].sort((a, b) => a - b));
		const [conditions] = await findMeasuredConditions(opened.db, scope);
		expect(conditions?.biases).toEqual(BIASES);
	});

	it('hold every device, each interpolated in its own sweep', async () => {
		const found = await findDistribution(opened.db, {
			...scope,
			conditionKey: `${SWEEP_KEY};VR=2`
		});
		expect(found).toMatchObject({ interpolated: true, sampleSize: 300, independentLots: 3 });
		const potential = found?.junctionPotential ?? 0;
		expect(potential).toBeGreaterThan(0.05);

		// By hand: each device on the straight line between its readings at 1 V and 4 V.
		const [left, right] = [columnOf(at25, 1), columnOf(at25, 4)];
		const x = (bias: number) => Math.log(bias + potential);
		const part = (x(2) - x(1)) / (x(4) - x(1));
		const y = [...left].map((value, device) => {
			const [a, b] = [Math.log(value * 1e-12), Math.log((right[device] ?? 0) * 1e-12)];
			return a + part * (b - a);
		});
		const mean = y.reduce((sum, value) => sum + value, 0) / 300;
		const squares = y.reduce((sum, value) => sum + (value - mean) ** 2, 0);
		expect(found?.mean).toBeCloseTo(mean, 11);
		expect(found?.standardDeviation).toBeCloseTo(Math.sqrt(squares / 299), 11);
	});

	it('are computed for further biases when a job names them, and never beyond the range', async () => {
		await compute({ biases: [7.5, 11, -1] });
		const all = await biasesAt('all');
		expect(all).toContain(7.5);
		expect(all).not.toContain(11);
		expect(all).not.toContain(-1);
	});

	it('are computed at once for a table that asks for one more, the same as by the job', async () => {
		const at = { temperatureCelsius: 25, frequency: FREQUENCY };
		const ask = (biases: number[]) => interpolateNow(opened.db, { ...scope, at, biases });
		expect(await biasesAt([2.37])).toEqual(BIASES);
		expect(await ask([2.37, 4, 12])).toEqual({ status: 'stored' });
		expect(await biasesAt([2.37, 12])).toEqual([0, 1, 2.37, 4, 10]);

		// The template's 3 V, computed by the job, and again by the request after it was removed.
		const of = { ...scope, conditionKey: `${SWEEP_KEY};VR=3` };
		const byJob = await findDistribution(opened.db, of);
		await write(opened.db, (tx) =>
			tx.delete(distribution).where(eq(distribution.conditionKey, of.conditionKey))
		);
		await ask([3]);
		expect(byJob?.interpolated).toBe(true);
		expect(await findDistribution(opened.db, of)).toEqual(byJob);
	});

	it('are left to a job when a table asks for very many', async () => {
		const many = Array.from({ length: 50 }, (_, i) => 4.01 + i / 100);
		const outcome = await interpolateNow(opened.db, {
			...scope,
			at: { temperatureCelsius: 25, frequency: FREQUENCY },
			biases: many
		});
		expect(outcome).toMatchObject({ status: 'underway' });
		const [queued] = await opened.db
			.select()
			.from(job)
			.where(eq(job.kind, 'compute-distributions'));
		expect(queued?.payload).toMatchObject({ product: productId, biases: many });
		expect(await biasesAt(many)).toEqual(BIASES);
	});

	it('become a dense band when a job asks for one', async () => {
		await compute({ isBand: true });
		const all = await biasesAt('all');
		// 4 measured, 5 of the template, 7.5 V and 2.37 V, and at most 40 of the band.
		expect(all.length).toBeGreaterThan(40);
		expect(all.length).toBeLessThanOrEqual(51);
		expect(await biasesAt()).toEqual(BIASES);
	});
});

describe('how biases vary together', () => {
	it('is stored, and gives the line that the devices give', async () => {
		const joint = (await findJointDistribution(opened.db, { ...scope, conditionKey: SWEEP_KEY }))!;
		expect(joint.biases).toEqual(BIASES);
		expect(joint.lotSizes).toEqual([100, 100, 100]);
		expect(curveCovariance(joint)).toMatchObject({ points: 4, lots: 3, withinDegrees: 297 });

		const ln = (bias: number) => columnOf(at25, bias).map((value) => Math.log(value * 1e-12));
		const ofDevices = regressionLine(ln(10), ln(1));
		const ofMoments = lineFromMoments(momentsOfPair(joint, 10, 1)!);
		expect(ofMoments.slope).toBeCloseTo(ofDevices.slope, 9);
		expect(ofMoments.intercept).toBeCloseTo(ofDevices.intercept, 8);
		expect(ofMoments.residualDeviation).toBeCloseTo(ofDevices.residualDeviation, 11);
	});

	it('is unknown at a temperature that was not measured', async () => {
		const at = { ...scope, conditionKey: 'T=85;f=1000000' };
		expect(await findJointDistribution(opened.db, at)).toBeUndefined();
	});
});

it('reads rows that were stored before origin, normality and components were kept', async () => {
	const key = `${SWEEP_KEY};VR=4`;
	await write(opened.db, (tx) =>
		tx
			.update(distribution)
			.set({
				summary: sql`json_remove(${distribution.summary}, '$.origin', '$.normality', '$.components')`
			})
			.where(and(eq(distribution.product, productId), eq(distribution.conditionKey, key)))
	);
	const found = await findDistribution(opened.db, { ...scope, conditionKey: key });
	expect(found).toMatchObject({
		origin: 'measured',
		normality: null,
		components: null,
		sampleSize: 300
	});
	expect(found).not.toHaveProperty('censoring');
});

describe('leakage of 75 devices, read single', () => {
	const LEAKAGE_KEY = 'T=25;VR=10';
	/** In nA; every nineteenth of the devices reads at the floor of 0.1 nA. */
	const isAtFloor = (device: number) => device % 19 === 7;
	const nanoamperes = Float64Array.from({ length: 75 }, (_, i) =>
		isAtFloor(i) ? 0.1 : 0.15 + ((i * 37) % 75) / 50
	);
	let leaking = 0;

	beforeAll(async () => {
		leaking = await insertProduct(opened.db, 'LKS-2001');
		const set = await insertAcceptedSet(opened.db, {
			product: leaking,
			sha256: 'b'.repeat(64),
			uncertainty: 0.02,
			devices: devices.filter((_, i) => i % 4 === 0),
			biases: [],
			frequency: FREQUENCY,
			picofarads: new Map()
		});
		await write(opened.db, (tx) =>
			tx.insert(readingBlock).values({
				set,
				characteristic: 'I_R',
				conditionKey: LEAKAGE_KEY,
				repeat: 0,
				chunk: 0,
				unitScale: 1e-9,
				values: Buffer.from(packMatrix(nanoamperes)),
				censored: Buffer.from(
					packFlags(Int8Array.from(nanoamperes, (_, i) => (isAtFloor(i) ? -1 : 0)))
				)
			})
		);
		await write(opened.db, (tx) =>
			tx.insert(verdict).values({
				set,
				device: 0,
				conditionKey: `I_R ${LEAKAGE_KEY}`,
				decision: 'exclude',
				reason: 'The probe slipped.',
				by: ENGINEER,
				at: '2026-01-06T08:00:00.000Z'
			})
		);
	});

	it('comes out censored, with every device counted but the one a verdict excludes', async () => {
		await compute({ product: leaking });
		const [owner] = await opened.db.select().from(product).where(eq(product.id, leaking));
		const found = await findDistribution(opened.db, {
			product: leaking,
			basisHash: owner?.basisHash ?? '',
			characteristic: 'I_R',
			conditionKey: LEAKAGE_KEY
		});
		expect(found).toMatchObject({
			unit: 'A',
			transform: 'ln',
			sampleSize: 74,
			independentLots: 3,
			excluded: 1,
			uncertainty: 0.02,
			censoring: { atOrBelow: 4, atOrAbove: 0, ceiling: null }
		});
		expect(found?.censoring?.floor).toBeCloseTo(0.1e-9, 20);
		expect(found?.groups.reduce((sum, of) => sum + of.sampleSize, 0)).toBe(70);
	});
});

describe('a distribution that is entered', () => {
	/** ln of farad: a typical of 12.5 pF, 2 % of spread. */
	const SUMMARY = {
		characteristic: 'C_tot',
		temperatureCelsius: -40,
		frequency: FREQUENCY,
		reverseVoltage: 4,
		n: 48,
		mean: Math.log(12.5e-12),
		standardDeviation: 0.02,
		reason: 'No chamber for −40 °C is free.',
		source: 'Report of the wafer foundry, table 3.'
	};
	const enter = (change: Partial<typeof SUMMARY> & { transform?: 'identity' } = {}) =>
		enterDistribution(
			{ db: opened.db },
			{ ...SUMMARY, ...change, partNumber: 'LKT-1130', by: ENGINEER }
		);
	const stored = async (temperatureCelsius: number) =>
		(await findDistributions(opened.db, { ...scope, temperatureCelsius })).map(
			({ distribution: of }) => of
		);

	it('is stored with reason and source, served where nothing is measured, and audited', async () => {
		expect(await enter({ n: 40 })).toMatchObject({ status: 'entered' });
		const outcome = await enter();
		expect(outcome).toMatchObject({
			status: 'entered',
			conditionKey: 'T=-40;f=1000000;VR=4',
			typical: expect.closeTo(12.5e-12, 24) as number
		});
		expect(await stored(-40)).toMatchObject([
			{ origin: 'entered', sampleSize: 48, sets: [], groups: [], independentLots: 0 }
		]);
		const conditionKey = 'T=-40;f=1000000;VR=4';
		expect(await findDistribution(opened.db, { ...scope, conditionKey })).toMatchObject({
			origin: 'entered',
			standardDeviation: 0.02
		});
		expect(await listEnteredDistributions(opened.db, productId)).toMatchObject([
			{ n: 48, reason: SUMMARY.reason, source: SUMMARY.source, by: 'Ida Sandvik' },
			{ n: 40 }
		]);
		const [entry] = await opened.db
			.select()
			.from(audit)
			.where(eq(audit.action, 'distribution.enter'))
			.limit(1);
		expect(entry).toMatchObject({ subject: 'LKT-1130 C_tot T=-40;f=1000000;VR=4' });
	});

	it('is refused where devices are measured or can be interpolated between', async () => {
		const refusal = {
			status: 'refused',
			why: 'measured',
			message: distributionMessages.isMeasured()
		};
		expect(await enter({ temperatureCelsius: 25 })).toEqual(refusal);
		expect(await enter({ temperatureCelsius: 25, reverseVoltage: 5.5 })).toEqual(refusal);
		expect(await enter({ temperatureCelsius: 25, reverseVoltage: 10.5 })).toMatchObject({
			status: 'entered'
		});
		expect((await stored(25)).map(({ origin }) => origin)).toEqual([
			'measured',
			'measured',
			'measured',
			'measured',
			'entered'
		]);
	});

	it('is refused for a characteristic nobody knows, and without a condition it depends on', async () => {
		expect(await enter({ characteristic: 'V_Q' })).toMatchObject({
			why: 'notAnswerable',
			message: distributionMessages.unknownCharacteristic(
				'V_Q',
				CHARACTERISTICS.map(({ key }) => key)
			)
		});
		const { reverseVoltage, ...withoutBias } = SUMMARY;
		expect(reverseVoltage).toBe(4);
		expect(
			await enterDistribution(
				{ db: opened.db },
				{ ...withoutBias, partNumber: 'LKT-1130', by: ENGINEER }
			)
		).toMatchObject({ message: distributionMessages.conditionMissing('C_tot', 'reverseVoltage') });
	});

	it('is stored for a single reading with the first of what it depends on', async () => {
		const voltage = {
			characteristic: 'V_F',
			temperatureCelsius: 25,
			forwardCurrent: 1,
			n: 30,
			mean: 0.42,
			standardDeviation: 0.006,
			reason: SUMMARY.reason,
			source: SUMMARY.source
		};
		const person = { partNumber: 'LKT-1130', by: ENGINEER };
		expect(await enterDistribution({ db: opened.db }, { ...voltage, ...person })).toMatchObject({
			conditionKey: 'T=25;IF=1',
			typical: 0.42
		});
		expect(
			await enterDistribution({ db: opened.db }, { ...voltage, ...person, frequency: 1e6 })
		).toMatchObject({ message: distributionMessages.conditionUnused('V_F', 'frequency') });
	});

	it('is refused when its mean was given in picofarads', async () => {
		expect(await enter({ mean: Math.log(12.5) })).toMatchObject({
			status: 'refused',
			why: 'notAnswerable',
			message: distributionMessages.implausible('12.5 F', 'ln C_tot with C_tot in F')
		});
	});

	it('is refused for a product that is not there', async () => {
		const unknown = { ...SUMMARY, partNumber: 'LKT-0000', by: ENGINEER };
		expect(await enterDistribution({ db: opened.db }, unknown)).toMatchObject({ why: 'noProduct' });
	});
});
