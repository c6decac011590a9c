import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { limitMessages } from '$lib/core/messages/limits';
import type { OpenDatabase } from '$lib/server/db/client';
import { findLimitByTrace } from '$lib/server/db/findLimitByTrace';
import { listPolicies } from '$lib/server/db/findPolicies';
import {
	audit,
	distribution,
	limitMemo,
	measurementSet,
	product,
	suspect,
	verdict
} from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import {
	capacitanceTable,
	type CapacitanceTable,
	type CapacitanceTableRequest
} from '$lib/server/services/capacitanceTable';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { ensurePolicies } from '$lib/server/services/ensurePolicies';
import { unreachableStorage } from '../factories/unreachableStorage';
import { ENGINEER, insertAcceptedSet, insertProduct } from '../factories/acceptedSet';
import { openTestDatabase } from '../factories/testDatabase';
import { BIASES, columnOf, devices, FREQUENCY, SWEEP_KEY, sweeps } from '../factories/threeLots';

const at25 = sweeps(7);
const at85 = sweeps(11);
let opened: OpenDatabase;
let productId = 0;
let setId = 0;
const policies = new Map<string, number>();

const computeNow = () =>
	computeDistributions(
		{ db: opened.db, storage: unreachableStorage },
		{ product: productId },
		{
			id: 1,
			attempt: 1,
			report: () => undefined,
			isCurrent: () => Promise.resolve(true)
		}
	);

type Table = Exclude<CapacitanceTable, { status: 'refused' }>;
async function tableOf(request: Partial<CapacitanceTableRequest> = {}): Promise<Table> {
	const table = await capacitanceTable(opened.db, {
		product: productId,
		temperatureCelsius: 25,
		biases: BIASES,
		policyVersion: policies.get('population-99-95') ?? 0,
		...request
	});
	if ('status' in table) throw new Error(table.message);
	return table;
}

beforeAll(async () => {
	opened = await openTestDatabase();
	await ensurePolicies({ db: opened.db });
	for (const { policy, id } of await listPolicies(opened.db)) policies.set(policy, id);
	productId = await insertProduct(opened.db);
	setId = await insertAcceptedSet(opened.db, {
		product: productId,
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
	await computeNow();
});
afterAll(() => opened.close());

/** The limits by the textbook, from the capacitances at one bias: nothing here is Platen's. */
function byTheBook(picofarads: readonly number[], factor: number, uncertainty: number) {
	const y = picofarads.map(Math.log);
	const mean = y.reduce((sum, value) => sum + value, 0) / y.length;
	const variance = y.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (y.length - 1);
	const sorted = picofarads.toSorted((a, b) => a - b);
	const middle = sorted.length / 2;
	const median = Number.isInteger(middle)
		? ((sorted[middle - 1] ?? 0) + (sorted[middle] ?? 0)) / 2
		: (sorted[Math.floor(middle)] ?? 0);
	const margin = factor * Math.sqrt(variance);
	return {
		minimum: Math.exp(mean - margin) * (1 - uncertainty),
		typical: median,
		maximum: Math.exp(mean + margin) * (1 + uncertainty)
	};
}

/** Three significant figures of a value from 1 to 99: the step is 0.1 from 10 on and 0.01 below. */
function printedAt(value: number, round: (steps: number) => number): string {
	const decimals = value >= 10 ? 1 : 2;
	return (round(Number((value * 10 ** decimals).toFixed(6))) / 10 ** decimals).toFixed(decimals);
}

// SciPy 1.17.1: nct.ppf(0.975, 299, norm.ppf(0.99)*sqrt(300))/sqrt(300)
const FACTOR_300 = 2.561245344955934;

describe('the table of a product', () => {
	it.each([
		[25, at25],
		[85, at85]
	])('agrees with the textbook at %i °C, digit by digit', async (temperatureCelsius, values) => {
		const table = await tableOf({ temperatureCelsius });
		expect(table.unit).toBe('pF');
		expect(table.rows.map((row) => row.condition.reverseVoltage)).toEqual(BIASES);
		for (const row of table.rows) {
			const expected = byTheBook(
				columnOf(values, row.condition.reverseVoltage ?? 0),
				FACTOR_300,
				0.003
			);
			expect(row.minimum?.text).toBe(printedAt(expected.minimum, Math.floor));
			expect(row.typical?.text).toBe(printedAt(expected.typical, Math.round));
			expect(row.maximum?.text).toBe(printedAt(expected.maximum, Math.ceil));
			expect(row.sampleSize).toBe(300);
			expect(row.independentLots).toBe(3);
			expect(row.basis).toBe('characterized');
		}
	});

	it('traces every row to a stored limit with its derivation', async () => {
		const { rows } = await tableOf();
		for (const row of rows) {
			const traced = await findLimitByTrace(opened.db, row.inputHash);
			expect(traced?.minimum?.text).toBe(row.minimum?.text);
			expect(traced?.minimum?.derivation.map((step) => step.name)).toEqual([
				'Measurement sets',
				'Verdicts',
				'Mean of ln C',
				'Spread of ln C',
				'Lots compared, F',
				'Factor k₁',
				'Raw minimum',
				'Drift over life',
				'Systematic uncertainty',
				'Round down'
			]);
		}
	});

	it('computes a limit once', async () => {
		await tableOf();
		const count = async () => (await opened.db.select().from(limitMemo)).length;
		const before = await count();
		const again = await tableOf();
		expect(await count()).toBe(before);
		expect(again).toEqual(await tableOf());
	});

	it('interpolates between measured biases and says so, and refuses one outside', async () => {
		const { rows } = await tableOf({ biases: [4, 5, 10, 40] });
		expect(rows.map((row) => row.refusals)).toEqual([
			[],
			[],
			[],
			[limitMessages.biasNotMeasured(40, BIASES)]
		]);
		const [at4 = 0, at5 = 0, at10 = 0] = rows.map(({ typical }) => typical?.raw);
		// The devices follow 40 pF·(1 + V/2)^−1.1 closely: 10.08 pF at 5 V.
		expect(at5 * 1e12).toBeCloseTo(40 * 3.5 ** -1.1, 1);
		expect(at4).toBeGreaterThan(at5);
		expect(at5).toBeGreaterThan(at10);
		expect(rows[1]?.minimum?.derivation[0]?.method).toContain('interpolated within each sweep');
		expect([rows[3]?.minimum, rows[3]?.typical, rows[3]?.maximum]).toEqual([null, null, null]);
	});

	it('refuses mean ± 4σ as a guarantee, and prints it behind a test', async () => {
		const policyVersion = policies.get('house-four-sigma') ?? 0;
		const alone = await tableOf({ policyVersion, biases: [4] });
		expect(alone.rows[0]?.refusals).toEqual([limitMessages.sigmaNeedsTest(4)]);
		const tested = await tableOf({ policyVersion, biases: [4], declaredBasis: 'tested' });
		const expected = byTheBook(columnOf(at25, 4), 4, 0.003);
		expect(tested.rows[0]?.minimum?.text).toBe(printedAt(expected.minimum, Math.floor));
		expect(tested.rows[0]?.basis).toBe('tested');
	});

	it.each<[string, Partial<CapacitanceTableRequest>, string, string]>([
		[
			'a temperature nobody measured',
			{ temperatureCelsius: 125 },
			'temperatureCelsius',
			limitMessages.temperatureNotMeasured(125, [25, 85])
		],
		[
			'a frequency nobody measured',
			{ frequency: 1e5 },
			'frequency',
			limitMessages.frequencyNotMeasured(1e5, [1e6])
		],
		[
			'a policy that does not exist',
			{ policyVersion: 999 },
			'policyVersion',
			limitMessages.noSuchPolicy(999)
		],
		['a product without data', { product: 999 }, 'product', limitMessages.noDistributions()]
	])('refuses %s', async (_, change, parameter, message) => {
		const table = await capacitanceTable(opened.db, {
			product: productId,
			temperatureCelsius: 25,
			policyVersion: policies.get('population-99-95') ?? 0,
			...change
		});
		expect(table).toEqual({ status: 'refused', parameter, message });
	});
});

describe('quarantine and verdicts', () => {
	const DEVICE = 42;
	const give = async (decision: 'keep' | 'exclude') => {
		await write(opened.db, (tx) =>
			tx.insert(verdict).values({
				set: setId,
				device: DEVICE,
				conditionKey: SWEEP_KEY,
				decision,
				reason: 'Contact seen on the probe camera',
				by: ENGINEER,
				at: '2026-01-06T08:00:00.000Z'
			})
		);
		await computeNow();
	};
	const without = (bias: number) => columnOf(at25, bias).filter((_, device) => device !== DEVICE);

	it('leave a suspect out at its condition only, and say so', async () => {
		await write(opened.db, (tx) =>
			tx.insert(suspect).values({ set: setId, device: DEVICE, conditionKey: SWEEP_KEY, reason: {} })
		);
		await computeNow();
		const [row] = (await tableOf({ biases: [4] })).rows;
		expect(row?.sampleSize).toBe(299);
		expect(row?.warnings).toContain(limitMessages.quarantined(1));
		// SciPy 1.17.1: nct.ppf(0.975, 298, norm.ppf(0.99)*sqrt(299))/sqrt(299)
		const expected = byTheBook(without(4), 2.5616692559599374, 0.003);
		expect((row?.minimum?.raw ?? 0) * 1e12 * 0.997).toBeCloseTo(expected.minimum, 9);
		expect((await tableOf({ biases: [4], temperatureCelsius: 85 })).rows[0]?.sampleSize).toBe(300);
	});

	it('bring a kept device in again', async () => {
		await give('keep');
		const [row] = (await tableOf({ biases: [4] })).rows;
		expect(row?.sampleSize).toBe(300);
		expect(row?.warnings).not.toContain(limitMessages.quarantined(1));
	});

	it('leave an excluded device out; the newest verdict holds', async () => {
		await give('exclude');
		const [row] = (await tableOf({ biases: [4] })).rows;
		expect(row?.sampleSize).toBe(299);
		expect(row?.minimum?.derivation[1]?.method).toContain('1 excluded by verdict');
	});

	it('keep the distributions that published limits trace to', async () => {
		const hashes = new Set(
			(await opened.db.select({ hash: distribution.basisHash }).from(distribution)).map(
				({ hash }) => hash
			)
		);
		// All devices (before, and kept again: one basis), one in quarantine, one excluded.
		expect(hashes.size).toBe(3);
	});
});

describe('the job', () => {
	it('writes into the audit what it computed from', async () => {
		const entries = await opened.db
			.select()
			.from(audit)
			.where(eq(audit.action, 'distributions.compute'));
		expect(entries.length).toBeGreaterThanOrEqual(4);
		// Four biases and the stored charge and energy at either temperature, and what lies between both.
		expect(entries[0]?.details).toMatchObject({ sets: [setId], leftOut: 0, distributions: 13 });
	});

	it('changes nothing when nothing changed', async () => {
		const before = await opened.db.select().from(audit);
		await computeNow();
		expect(await opened.db.select().from(audit)).toEqual(before);
	});

	it('starts again when a set is retired while it works', async () => {
		const second = await insertAcceptedSet(opened.db, {
			product: productId,
			sha256: 'b'.repeat(64),
			uncertainty: 0.01,
			devices: [{ lot: 'LK26-023', wafer: '01', name: '1' }],
			biases: [4],
			frequency: FREQUENCY,
			picofarads: new Map([[25, Float64Array.of(12)]])
		});
		let isRetired = false;
		await computeDistributions(
			{ db: opened.db, storage: unreachableStorage },
			{ product: productId },
			{
				id: 1,
				attempt: 1,
				report: ({ done }) => {
					if (isRetired || done === 0) return;
					isRetired = true;
					void write(opened.db, (tx) =>
						tx.update(measurementSet).set({ state: 'retired' }).where(eq(measurementSet.id, second))
					);
				},
				isCurrent: () => Promise.resolve(true)
			}
		);
		expect(isRetired).toBe(true);
		const [row] = (await tableOf({ biases: [4] })).rows;
		expect(row?.independentLots).toBe(3);
	});

	it('points at nothing when every set is retired', async () => {
		await write(opened.db, (tx) => tx.update(measurementSet).set({ state: 'retired' }));
		await computeNow();
		const [owner] = await opened.db.select().from(product).where(eq(product.id, productId));
		expect(owner?.basisHash).toBeNull();
	});
});

it('refuses a payload without a product', async () => {
	await expect(
		computeDistributions(
			{ db: opened.db, storage: unreachableStorage },
			{},
			{
				id: 1,
				attempt: 1,
				report: () => undefined,
				isCurrent: () => Promise.resolve(true)
			}
		)
	).rejects.toThrow('product');
});
