import { and, asc, eq, like, sql } from 'drizzle-orm';
import { enteredDistribution, enteredValues } from '$lib/core/distributions/enteredDistribution';
import type { Distribution } from '$lib/core/distributions/summary';
import type { Database } from './database';
import { enteredDistribution as enteredTable } from './schema';

/**
 * The newest distribution entered for each condition, at one temperature or at all, whether used or
 * not.
 */
export async function findEnteredDistributions(
	db: Database,
	at: {
		readonly product: number;
		readonly characteristic: string;
		/** Default: every temperature. */
		readonly temperatureCelsius?: number;
	}
): Promise<Distribution[]> {
	const rows = await db
		.select()
		.from(enteredTable)
		.where(
			and(
				eq(enteredTable.product, at.product),
				eq(enteredTable.characteristic, at.characteristic),
				at.temperatureCelsius === undefined
					? undefined
					: like(sql`${enteredTable.conditionKey} || ';'`, `T=${at.temperatureCelsius};%`)
			)
		)
		.orderBy(asc(enteredTable.id));
	const newest = new Map(rows.map((row) => [row.conditionKey, row]));
	return [...newest.values()].map(({ characteristic, conditionKey, entered }) =>
		enteredDistribution({ characteristic, conditionKey, ...enteredValues.parse(entered) })
	);
}
