import { and, eq, sql } from 'drizzle-orm';
import type { Condition } from '$lib/core/characteristics/condition';
import { unpackGroups } from '$lib/core/distributions/packGroups';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { distributionSummary, type Distribution } from '$lib/core/distributions/summary';
import type { Database } from './database';
import { findEnteredDistributions } from './findEnteredDistributions';
import { distribution } from './schema';
import type { StoredDistribution } from './findDistributions';

const PARTS = [
	'temperatureCelsius',
	'frequency',
	'reverseVoltage',
	'secondReverseVoltage',
	'forwardCurrent',
	'reverseCurrent',
	'pulseDuration',
	'currentSlope'
] as const satisfies readonly (keyof Condition)[];

/**
 * Every distribution of a characteristic that isn't swept along a bias, in the order of its
 * conditions: computed from devices, and entered where nothing is computed.
 */
export async function findCharacteristicDistributions(
	db: Database,
	at: { readonly product: number; readonly basisHash: string; readonly characteristic: string }
): Promise<StoredDistribution[]> {
	const rows = await db
		.select()
		.from(distribution)
		.where(
			and(
				eq(distribution.product, at.product),
				eq(distribution.characteristic, at.characteristic),
				eq(distribution.basisHash, at.basisHash),
				sql`json_extract(${distribution.summary}, '$.interpolated') = 0`
			)
		);
	const computed = rows.map((row): Distribution => ({
		...distributionSummary.parse(row.summary),
		...unpackGroups(row.groups)
	}));
	const known = new Set(computed.map(({ conditionKey }) => conditionKey));
	const entered = (await findEnteredDistributions(db, at)).filter(
		({ conditionKey }) => !known.has(conditionKey)
	);
	return [...computed, ...entered]
		.map((of) => ({ condition: readConditionKey(of.conditionKey), distribution: of }))
		.sort((a, b) => order(a.condition, b.condition));
}

function order(a: Condition, b: Condition): number {
	for (const part of PARTS) {
		const difference = (a[part] ?? -Infinity) - (b[part] ?? -Infinity);
		if (difference !== 0 && !Number.isNaN(difference)) return difference;
	}
	return 0;
}
