import { afterAll, beforeAll, expect, it } from 'vitest';
import { limitPolicy } from '$lib/core/limits/policy';
import { policyText } from '$lib/core/limits/policyText';
import { limitMessages } from '$lib/core/messages/limits';
import type { OpenDatabase } from '$lib/server/db/client';
import { policyVersion } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { capacitanceTable } from '$lib/server/services/capacitanceTable';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { DEFAULT_POLICIES } from '$lib/server/services/ensurePolicies';
import { sha256 } from '$lib/server/services/sha256';
import { handlers } from '$lib/server/work/handlers';
import { runOpenJobs } from '$lib/server/work/runOpenJobs';
import { insertAcceptedSet, insertProduct } from '../factories/acceptedSet';
import { openTestDatabase } from '../factories/testDatabase';
import { BIASES, devices, FREQUENCY, sweeps } from '../factories/threeLots';
import { unreachableStorage } from '../factories/unreachableStorage';

let opened: OpenDatabase;
let product = 0;
const policies = { each: 0, whole: 0, pooled: 0 };

/** Sweeps of which each bias also varies on its own. */
const loose = () =>
	sweeps(7).map((value, i) => Number((value * Math.exp(0.02 * Math.sin(i * i))).toFixed(3)));

const stores = () => ({ db: opened.db, storage: unreachableStorage });

async function addPolicy(changes: object): Promise<number> {
	const [base] = DEFAULT_POLICIES;
	const json = limitPolicy.parse({ ...base?.rules, ...changes });
	const hash = sha256(policyText(json));
	const [added] = await write(opened.db, (tx) =>
		tx
			.insert(policyVersion)
			.values({
				policy: hash.slice(0, 12),
				number: 1,
				json,
				hash,
				createdAt: '2026-01-05T08:00:00.000Z',
				createdBy: null
			})
			.returning()
	);
	return added?.id ?? 0;
}

async function rowsBy(version: number) {
	const table = await capacitanceTable(opened.db, {
		product,
		temperatureCelsius: 25,
		policyVersion: version
	});
	if ('status' in table) throw new Error(table.message);
	return table.rows;
}

beforeAll(async () => {
	opened = await openTestDatabase();
	policies.each = await addPolicy({});
	policies.whole = await addPolicy({ span: 'whole-curve' });
	policies.pooled = await addPolicy({ span: 'whole-curve', method: 'normal' });
	product = await insertProduct(opened.db);
	await insertAcceptedSet(opened.db, {
		product,
		sha256: 'a'.repeat(64),
		uncertainty: 0.003,
		devices,
		biases: BIASES,
		frequency: FREQUENCY,
		picofarads: new Map([[25, loose()]])
	});
	await computeDistributions(
		stores(),
		{ product },
		{ id: 1, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
	);
});
afterAll(() => opened.close());

it('waits for its simulation, and then widens every limit by the same factor', async () => {
	const waiting = await rowsBy(policies.whole);
	expect(waiting[0]?.refusals).toEqual([limitMessages.wholeCurveNotSimulated()]);

	await runOpenJobs(stores(), handlers);
	const [whole, each] = [await rowsBy(policies.whole), await rowsBy(policies.each)];
	expect(whole.map(({ refusals }) => refusals)).toEqual(BIASES.map(() => []));
	const ratios = whole.map(
		({ maximum }, at) => (maximum?.factor ?? 0) / (each[at]?.maximum?.factor ?? 1)
	);
	const [first = 0] = ratios;
	expect(first).toBeGreaterThan(1);
	// Four biases, were they independent, would ask for 0.99^¼ each: z(0.9975)/z(0.99) = 1.21.
	expect(first).toBeLessThan(1.21);
	for (const ratio of ratios) expect(ratio).toBeCloseTo(first, 9);
	expect(whole[0]?.maximum?.derivation.some(({ method }) => method.includes('of fixed seed'))).toBe(
		true
	);
});

it('is made by `lots` alone', async () => {
	const [row] = await rowsBy(policies.pooled);
	expect(row?.refusals).toEqual([limitMessages.wholeCurveNeedsLots('normal')]);
});
