import { and, eq, like, sql } from 'drizzle-orm';
import type { Database } from './database';
import { distribution } from './schema';

/** The keys of every condition at a temperature with a computed distribution, interpolated ones too. */
export async function findDistributionBiases(
	db: Database,
	at: {
		readonly product: number;
		readonly basisHash: string;
		readonly characteristic: string;
		readonly temperatureCelsius: number;
	}
): Promise<string[]> {
	const found = await db
		.select({ conditionKey: distribution.conditionKey })
		.from(distribution)
		.where(
			and(
				eq(distribution.product, at.product),
				eq(distribution.characteristic, at.characteristic),
				eq(distribution.basisHash, at.basisHash),
				like(sql`${distribution.conditionKey} || ';'`, `T=${at.temperatureCelsius};%`)
			)
		);
	return found.map(({ conditionKey }) => conditionKey);
}
