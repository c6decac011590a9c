import { and, asc, eq, notExists, sql } from 'drizzle-orm';
import type { Database } from './database';
import { measurementSet, product, suspect, verdict } from './schema';

/** Suspect devices of accepted sets that wait for a verdict: how many distinct ones, by set. */
export function listQuarantines(db: Database) {
	const decided = db
		.select({ id: verdict.id })
		.from(verdict)
		.where(
			and(
				eq(verdict.set, suspect.set),
				eq(verdict.device, suspect.device),
				eq(verdict.conditionKey, suspect.conditionKey)
			)
		);
	return db
		.select({
			partNumber: product.partNumber,
			set: measurementSet.id,
			since: measurementSet.acceptedAt,
			devices: sql<number>`count(distinct ${suspect.device})`
		})
		.from(suspect)
		.innerJoin(measurementSet, eq(suspect.set, measurementSet.id))
		.innerJoin(product, eq(measurementSet.product, product.id))
		.where(and(eq(measurementSet.state, 'accepted'), notExists(decided)))
		.groupBy(measurementSet.id)
		.orderBy(asc(measurementSet.acceptedAt));
}
