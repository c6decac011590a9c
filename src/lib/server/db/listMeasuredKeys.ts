import { and, eq, sql } from 'drizzle-orm';
import type { Database } from './database';
import { distribution } from './schema';

/** The condition keys at which devices of a product were measured: nothing interpolated. */
export async function listMeasuredKeys(
	db: Database,
	at: { readonly product: number; readonly basisHash: string; readonly characteristic: string }
): Promise<string[]> {
	const rows = await db
		.select({ conditionKey: distribution.conditionKey })
		.from(distribution)
		.where(
			and(
				eq(distribution.product, at.product),
				eq(distribution.characteristic, at.characteristic),
				eq(distribution.basisHash, at.basisHash),
				sql`json_extract(${distribution.summary}, '$.interpolated') = 0`
			)
		);
	return rows.map(({ conditionKey }) => conditionKey);
}
