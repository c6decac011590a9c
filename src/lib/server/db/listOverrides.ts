import { and, asc, eq } from 'drizzle-orm';
import { limitDecision, type DecidedLimit } from '$lib/core/limits/decision/limitDecision';
import type { Database } from './database';
import { limitOverride, person } from './schema';

export interface OverridesOf {
	readonly product: number;
	readonly characteristic: string;
	readonly policyVersion: number;
	readonly basis: string;
}

/** The decisions that stand for a product by one policy and basis, by the key of their condition. */
export async function listOverrides(
	db: Database,
	of: OverridesOf
): Promise<ReadonlyMap<string, DecidedLimit>> {
	const rows = await db
		.select({
			conditionKey: limitOverride.conditionKey,
			decision: limitOverride.decision,
			reason: limitOverride.reason,
			by: person.name,
			at: limitOverride.at
		})
		.from(limitOverride)
		.innerJoin(person, eq(person.id, limitOverride.by))
		.where(
			and(
				eq(limitOverride.product, of.product),
				eq(limitOverride.characteristic, of.characteristic),
				eq(limitOverride.policyVersion, of.policyVersion),
				eq(limitOverride.basis, of.basis)
			)
		)
		.orderBy(asc(limitOverride.id));
	const standing = new Map<string, DecidedLimit>();
	for (const { conditionKey, decision, ...who } of rows) {
		if (decision === null) standing.delete(conditionKey);
		else standing.set(conditionKey, { ...who, decision: limitDecision.parse(decision) });
	}
	return standing;
}
