import { and, eq, like } from 'drizzle-orm';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { distributionSummary, type Distribution } from '$lib/core/distributions/summary';
import { unpackGroups } from '$lib/core/distributions/packGroups';
import type { Condition } from '$lib/core/characteristics/condition';
import type { Database } from './database';
import { distribution } from './schema';

export interface StoredDistribution {
	readonly condition: Condition;
	readonly distribution: Distribution;
}

/** The distributions of a characteristic at one temperature, at every frequency and bias. */
export async function findDistributions(
	db: Database,
	at: {
		readonly product: number;
		readonly basisHash: string;
		readonly characteristic: string;
		readonly temperatureCelsius: number;
	}
): Promise<StoredDistribution[]> {
	const stored = await db
		.select()
		.from(distribution)
		.where(
			and(
				eq(distribution.product, at.product),
				eq(distribution.characteristic, at.characteristic),
				eq(distribution.basisHash, at.basisHash),
				like(distribution.conditionKey, `T=${at.temperatureCelsius};%`)
			)
		);
	return stored
		.map((row) => ({
			condition: readConditionKey(row.conditionKey),
			distribution: {
				...distributionSummary.parse(row.summary),
				...unpackGroups(row.groups)
			}
		}))
		.sort((a, b) => (a.condition.reverseVoltage ?? 0) - (b.condition.reverseVoltage ?? 0));
}
