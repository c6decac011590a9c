import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { OpenDatabase } from '$lib/server/db/client';
import { listPolicies } from '$lib/server/db/findPolicies';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { suspect } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { capacitanceCurve } from '$lib/server/services/capacitanceCurve';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { ensurePolicies } from '$lib/server/services/ensurePolicies';
import { limitsOverview } from '$lib/server/services/limitsOverview';
import { sampleSweeps } from '$lib/server/services/sampleSweeps';
import { insertAcceptedSet, insertProduct } from '../factories/acceptedSet';
import { openTestDatabase } from '../factories/testDatabase';
import {
	BIASES,
	columnOf,
	devices,
	FREQUENCY,
	LOTS,
	SWEEP_KEY,
	sweeps
} from '../factories/threeLots';
import { unreachableStorage } from '../factories/unreachableStorage';

const at25 = sweeps(7);
const at85 = sweeps(11);
const QUARANTINED = 0;
let opened: OpenDatabase;
let product = 0;
let scope: { product: number; basisHash: string; policyVersion: number; declaredBasis: undefined };

beforeAll(async () => {
	opened = await openTestDatabase();
	const { db } = opened;
	await ensurePolicies({ db });
	product = await insertProduct(db);
	const set = await insertAcceptedSet(db, {
		product,
		sha256: 'a'.repeat(64),
		uncertainty: 0.003,
		devices,
		biases: BIASES,
		frequency: FREQUENCY,
		picofarads: new Map([
			[25, at25],
			[85, at85]
		])
	});
	await write(db, (tx) =>
		tx.insert(suspect).values({ set, device: QUARANTINED, conditionKey: SWEEP_KEY, reason: {} })
	);
	await computeDistributions(
		{ db, storage: unreachableStorage },
		{ product },
		{
			id: 1,
			attempt: 1,
			report: () => undefined,
			isCurrent: () => Promise.resolve(true)
		}
	);
	const found = await findProductByPartNumber(db, 'LKT-1130');
	const [policy] = await listPolicies(db);
	scope = {
		product,
		basisHash: found?.basisHash ?? '',
		policyVersion: policy?.id ?? 0,
		declaredBasis: undefined
	};
});
afterAll(() => opened.close());

describe('the overview of limits', () => {
	it('has every temperature and bias that was measured', async () => {
		const groups = await limitsOverview(opened.db, scope);
		expect(
			groups.map((group) => [
				group.temperatureCelsius,
				group.frequency,
				group.rows.map((row) => row.condition.reverseVoltage)
			])
		).toEqual([
			[25, FREQUENCY, BIASES],
			[85, FREQUENCY, BIASES]
		]);
	});
});

describe('the curve', () => {
	const curveAt = (temperatureCelsius: number | undefined) =>
		capacitanceCurve(opened.db, { ...scope, temperatureCelsius, frequency: undefined });

	it('is the one nearest to 25 °C where none is asked for, or none was measured there', async () => {
		expect((await curveAt(undefined))?.temperatureCelsius).toBe(25);
		expect((await curveAt(85))?.temperatureCelsius).toBe(85);
		expect((await curveAt(70))?.temperatureCelsius).toBe(85);
	});

	it('tells the spread between lots from that within them', async () => {
		const curve = await curveAt(85);
		const row = curve?.rows.find(({ limit }) => limit.condition.reverseVoltage === 4);
		// The textbook's one-way analysis of variance, balanced: within = mean of the lots' variances,
		// between = (n·variance of the lots' means − within)/n.
		const y = columnOf(at85, 4).map(Math.log);
		const lots = LOTS.map((_, lot) => y.slice(lot * 100, lot * 100 + 100));
		const mean = (of: readonly number[]) => of.reduce((sum, one) => sum + one, 0) / of.length;
		const variance = (of: readonly number[]) =>
			of.reduce((sum, one) => sum + (one - mean(of)) ** 2, 0) / (of.length - 1);
		const within = mean(lots.map(variance));
		const between = Math.max(0, variance(lots.map(mean)) - within / 100);
		expect(row?.withinPercent).toBeCloseTo(Math.sqrt(within) * 100, 9);
		expect(row?.betweenPercent).toBeCloseTo(Math.sqrt(between) * 100, 9);
	});

	it('is missing where nothing is computed', async () => {
		expect(
			await capacitanceCurve(opened.db, {
				...scope,
				basisHash: 'none',
				temperatureCelsius: 25,
				frequency: undefined
			})
		).toBeUndefined();
	});
});

describe('the sample of sweeps', () => {
	const sampleWithin = (minimum: number | null, maximum: number | null) =>
		sampleSweeps(opened.db, {
			product,
			temperatureCelsius: 25,
			frequency: FREQUENCY,
			unitScale: 1e-12,
			limits: new Map([[4, { minimum, maximum }]])
		});

	it('is at most 80 of the devices that count, spread over the lots', async () => {
		const sample = await sampleWithin(null, null);
		expect(sample).toMatchObject({ total: 299, outside: 0 });
		expect(sample.sweeps.length).toBeGreaterThan(50);
		expect(sample.sweeps.length).toBeLessThanOrEqual(80);
		for (const lot of LOTS) {
			expect(sample.sweeps.some(({ name }) => name.startsWith(lot))).toBe(true);
		}
		expect(sample.sweeps.every(({ readings }) => readings.length === BIASES.length)).toBe(true);
	});

	it('counts those outside of a limit, and draws some of them', async () => {
		const values = columnOf(at25, 4).filter((_, device) => device !== QUARANTINED);
		const limit = values.toSorted((a, b) => a - b)[30] ?? 0;
		const sample = await sampleWithin(limit, null);
		expect(sample.outside).toBe(values.filter((value) => value < limit).length);
		expect(sample.sweeps.filter(({ isOutside }) => isOutside)).toHaveLength(20);
		expect(sample.sweeps.length).toBeLessThanOrEqual(80);
	});

	it('says the numbers that were measured', async () => {
		const [first] = (await sampleWithin(null, null)).sweeps;
		const measured = BIASES.map((bias) => ({
			bias,
			capacitance: columnOf(at25, bias)[1] ?? Number.NaN
		}));
		expect(first?.readings).toEqual(measured);
		expect(first?.name).toBe('LK26-011 · 01 · 2');
	});
});
