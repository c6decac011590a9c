import { desc, eq } from 'drizzle-orm';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { enteredValues } from '$lib/core/distributions/enteredDistribution';
import type { Database } from './database';
import { enteredDistribution, person } from './schema';

/** Every distribution entered for a product, newest first; the newest of a condition holds. */
export async function listEnteredDistributions(db: Database, product: number) {
	const rows = await db
		.select({
			characteristic: enteredDistribution.characteristic,
			conditionKey: enteredDistribution.conditionKey,
			entered: enteredDistribution.entered,
			reason: enteredDistribution.reason,
			source: enteredDistribution.source,
			by: person.name,
			at: enteredDistribution.at
		})
		.from(enteredDistribution)
		.innerJoin(person, eq(person.id, enteredDistribution.by))
		.where(eq(enteredDistribution.product, product))
		.orderBy(desc(enteredDistribution.id));
	return rows.map(({ entered, conditionKey, ...rest }) => ({
		...rest,
		...readConditionKey(conditionKey),
		...enteredValues.parse(entered)
	}));
}
