import { and, eq } from 'drizzle-orm';
import { unpackGroups } from '$lib/core/distributions/packGroups';
import { distributionSummary, type Distribution } from '$lib/core/distributions/summary';
import type { Database } from './database';
import { distribution } from './schema';

/** The distribution of a characteristic at one condition, bias included, or `undefined`. */
export async function findDistribution(
	db: Database,
	at: {
		readonly product: number;
		readonly basisHash: string;
		readonly characteristic: string;
		readonly conditionKey: string;
	}
): Promise<Distribution | undefined> {
	const [found] = await db
		.select()
		.from(distribution)
		.where(
			and(
				eq(distribution.product, at.product),
				eq(distribution.characteristic, at.characteristic),
				eq(distribution.conditionKey, at.conditionKey),
				eq(distribution.basisHash, at.basisHash)
			)
		)
		.limit(1);
	return found && { ...distributionSummary.parse(found.summary), ...unpackGroups(found.groups) };
}
