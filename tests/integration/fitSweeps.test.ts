import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { OpenDatabase } from '$lib/server/db/client';
import { findDistributions } from '$lib/server/db/findDistributions';
import { findSweepFits } from '$lib/server/db/findSweepFits';
import { job, product, sweepFit, verdict } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { fitsKey, fitSweepsJob } from '$lib/server/services/fitSweepsJob';
import { ENGINEER } from '../factories/acceptedSet';
import {
	insertPowerSchottky,
	POWER_BIASES,
	POWER_LAW,
	POWER_SWEEP_KEY
} from '../factories/powerSchottky';
import { openTestDatabase } from '../factories/testDatabase';
import { unreachableStorage } from '../factories/unreachableStorage';

let opened: OpenDatabase;
let productId = 0;

const context = {
	id: 1,
	attempt: 1,
	report: () => undefined,
	isCurrent: () => Promise.resolve(true)
};
const stores = () => ({ db: opened.db, storage: unreachableStorage });
const compute = () => computeDistributions(stores(), { product: productId }, context);
const fit = () => fitSweepsJob(stores(), { product: productId }, context);
const hashNow = async () => {
	const [owner] = await opened.db.select().from(product).where(eq(product.id, productId));
	return owner?.basisHash ?? '';
};
const fitsNow = async () =>
	findSweepFits(opened.db, {
		product: productId,
		basisHash: await hashNow(),
		conditionKey: POWER_SWEEP_KEY
	});

beforeAll(async () => {
	opened = await openTestDatabase();
	productId = await insertPowerSchottky(opened.db, 'LKR-4006');
	await compute();
});
afterAll(() => opened.close());

describe('the fits of a product', () => {
	it('are asked for by the distributions they belong to', async () => {
		const asked = await opened.db.select().from(job).where(eq(job.kind, 'fit-sweeps'));
		expect(asked.map(({ dedupeKey }) => dedupeKey)).toEqual([fitsKey(productId, await hashNow())]);
	});

	it('hold the law of the median device and the share of the others', async () => {
		expect(await fit()).toEqual({ conditions: 1, devices: 15 });
		const fits = await fitsNow();
		expect(fits).toMatchObject({ devices: 15, notIdentifiable: 0, notConverged: 0 });
		const median = (name: string) =>
			fits?.parameters
				.find((of) => of.name === name)
				?.quantiles.find(({ probability }) => probability === 0.5)?.value ?? 0;
		expect(median('zeroBiasCapacitance') * 1e12).toBeCloseTo(500, 4);
		expect(median('junctionPotential')).toBeCloseTo(POWER_LAW.junctionPotential, 6);
		expect(median('gradingExponent')).toBeCloseTo(0.5, 7);
		expect(median('caseCapacitance') * 1e12).toBeCloseTo(5, 4);
		// Lots are half a per cent apart: 497.5, 500 and 502.5 pF.
		const lots = fits?.parameters[0]?.lots.map((of) => (of.median ?? 0) * 1e12) ?? [];
		expect(lots.map((value) => Number(value.toFixed(3)))).toEqual([497.5, 500, 502.5]);
		expect(fits?.worst).toHaveLength(15);
		expect(fits?.worst[0]?.residualRms).toBeLessThan(1e-6);
	});

	it('fill the band between the measured biases, and change no measured one', async () => {
		const at = {
			product: productId,
			basisHash: await hashNow(),
			characteristic: 'C_tot',
			temperatureCelsius: 25
		};
		const all = await findDistributions(opened.db, { ...at, interpolated: 'all' });
		expect(all.length).toBeGreaterThanOrEqual(POWER_BIASES.length + 30);
		const between = all.filter(({ distribution }) => distribution.interpolated);
		const largest = Math.max(...between.map(({ condition }) => condition.reverseVoltage ?? 0));
		expect(largest).toBeLessThan(400);
		expect(
			(await findDistributions(opened.db, at)).map(({ condition: c }) => c.reverseVoltage)
		).toEqual(POWER_BIASES);
	});

	it('are stored once, however often the job runs', async () => {
		await fit();
		expect(await opened.db.select().from(sweepFit)).toHaveLength(1);
	});

	it('are made anew without a device that a verdict leaves out', async () => {
		await write(opened.db, (tx) =>
			tx.insert(verdict).values({
				set: 1,
				device: 0,
				conditionKey: POWER_SWEEP_KEY,
				decision: 'exclude',
				reason: 'contact lost',
				by: ENGINEER,
				at: '2026-01-06T08:00:00.000Z'
			})
		);
		// The distributions are those of before the verdict: these fits would be of another basis.
		expect(await fit()).toEqual({ conditions: 0, devices: 0 });
		await compute();
		await fit();
		expect((await fitsNow())?.devices).toBe(14);
	});
});
