import { and, eq } from 'drizzle-orm';
import { unpackGroups } from '$lib/core/distributions/packGroups';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { distributionSummary, type Distribution } from '$lib/core/distributions/summary';
import type { Database } from './database';
import { findEnteredDistributions } from './findEnteredDistributions';
import { distribution } from './schema';

/**
 * The distribution of a characteristic at one condition, bias included: computed, or else entered;
 * `undefined` when there is neither.
 */
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
	if (found) {
		return { ...distributionSummary.parse(found.summary), ...unpackGroups(found.groups) };
	}
	const { temperatureCelsius } = readConditionKey(at.conditionKey);
	const entered = await findEnteredDistributions(db, { ...at, temperatureCelsius });
	return entered.find(({ conditionKey }) => conditionKey === at.conditionKey);
}
