import { eq } from 'drizzle-orm';
import { z } from 'zod';
import type { JointDistribution } from '$lib/core/distributions/jointDistribution';
import type { Side } from '$lib/core/limits/allowance';
import {
	curveWidening as parsed,
	simulateWidening,
	wideningInputText,
	type CurveWidening
} from '$lib/core/limits/curveWidening';
import type { LimitPolicy } from '$lib/core/limits/policy';
import type { Connection } from '../db/database';
import { findJointDistribution } from '../db/findJointDistribution';
import { findPolicyVersion } from '../db/findPolicies';
import { curveWidening, product } from '../db/schema';
import { write } from '../db/write';
import { enqueue } from '../work/enqueue';
import type { JobHandler } from '../work/jobHandler';
import { sha256 } from './sha256';

/** A curve of a product, and which of its limits are promised at once. */
export interface CurveOf {
	readonly product: number;
	readonly basisHash: string;
	readonly characteristic: string;
	/** Temperature and frequency, without a bias. */
	readonly conditionKey: string;
	readonly sides: readonly Side[];
}

/**
 * The factor of a whole-curve policy, as it was simulated; `undefined` where it isn't yet. Nothing
 * is simulated here, since it takes longer than a page may.
 */
export async function storedWidening(
	db: Connection,
	curve: CurveOf,
	rules: LimitPolicy
): Promise<CurveWidening | undefined> {
	const joint = await findJointDistribution(db, curve);
	if (joint === undefined) return undefined;
	return readWidening(db, sha256(wideningInputText(joint, rules, curve.sides)));
}

async function readWidening(db: Connection, key: string): Promise<CurveWidening | undefined> {
	const [found] = await db
		.select({ result: curveWidening.result })
		.from(curveWidening)
		.where(eq(curveWidening.inputHash, key))
		.limit(1);
	return found && parsed.parse(found.result);
}

const SIDES = z.array(z.enum(['minimum', 'maximum'])).min(1);

export const simulateWideningPayload = z.object({
	product: z.number().int(),
	characteristic: z.string(),
	conditionKey: z.string(),
	policyVersion: z.number().int(),
	sides: SIDES
});

/** Has the factor of a curve simulated, unless that already waits. */
export async function enqueueWidening(
	db: Connection,
	{ basisHash, ...curve }: CurveOf,
	policyVersion: number
): Promise<void> {
	const payload = { ...curve, policyVersion };
	await write(db, (tx) =>
		enqueue(tx, {
			kind: 'simulate-widening',
			payload,
			dedupeKey: `simulate-widening:${basisHash}:${JSON.stringify(payload)}`,
			by: null
		})
	);
}

/** Simulates the whole-curve factor of a policy on a curve and keeps it. */
export const simulateWideningJob: JobHandler = async ({ db }, payload) => {
	const { product: id, policyVersion, sides, ...of } = simulateWideningPayload.parse(payload);
	const [owner] = await db.select().from(product).where(eq(product.id, id)).limit(1);
	const policy = await findPolicyVersion(db, policyVersion);
	if (policy === undefined || owner?.basisHash == null) return { simulated: false };
	const joint = await findJointDistribution(db, {
		...of,
		product: id,
		basisHash: owner.basisHash
	});
	if (joint === undefined) return { simulated: false };
	const found = await computedWidening(db, joint, policy.rules, sides);
	return { simulated: found !== undefined };
};

/** The factor, simulated where it isn't kept yet. For jobs only. */
export async function computedWidening(
	db: Connection,
	joint: JointDistribution,
	rules: LimitPolicy,
	sides: readonly Side[]
): Promise<CurveWidening | undefined> {
	const inputHash = sha256(wideningInputText(joint, rules, sides));
	const kept = await readWidening(db, inputHash);
	if (kept !== undefined) return kept;
	const result = simulateWidening(joint, rules, sides);
	if (result === undefined) return undefined;
	await write(db, (tx) =>
		tx.insert(curveWidening).values({ inputHash, result }).onConflictDoNothing()
	);
	return result;
}
