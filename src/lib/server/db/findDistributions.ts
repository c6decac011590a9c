import { and, eq, inArray, like, sql } from 'drizzle-orm';
import { findCharacteristic } from '$lib/core/characteristics/catalogue';
import type { Condition } from '$lib/core/characteristics/condition';
import { unpackGroups } from '$lib/core/distributions/packGroups';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { distributionSummary, type Distribution } from '$lib/core/distributions/summary';
import { usableEntered } from '$lib/core/distributions/usableEntered';
import type { Database } from './database';
import { findEnteredDistributions } from './findEnteredDistributions';
import { distribution } from './schema';

export interface StoredDistribution {
	readonly condition: Condition;
	readonly distribution: Distribution;
}

/** Which of the biases between measured ones are wanted, too: none, some in V, or all stored. */
export type InterpolatedWanted = readonly number[] | 'all';

/**
 * The distributions of a characteristic at one temperature, at every frequency and bias: measured,
 * and entered where nothing is; interpolated ones only where asked for.
 */
export async function findDistributions(
	db: Database,
	at: {
		readonly product: number;
		readonly basisHash: string;
		readonly characteristic: string;
		readonly temperatureCelsius: number;
		/** Default: none. */
		readonly interpolated?: InterpolatedWanted;
	}
): Promise<StoredDistribution[]> {
	const { interpolated: wanted = [] } = at;
	const keys = await db
		.select({
			id: distribution.id,
			conditionKey: distribution.conditionKey,
			isInterpolated: sql<number>`json_extract(${distribution.summary}, '$.interpolated')`
		})
		.from(distribution)
		.where(
			and(
				eq(distribution.product, at.product),
				eq(distribution.characteristic, at.characteristic),
				eq(distribution.basisHash, at.basisHash),
				like(sql`${distribution.conditionKey} || ';'`, `T=${at.temperatureCelsius};%`)
			)
		);
	const ids = keys.flatMap(({ id, conditionKey, isInterpolated }) => {
		const isWanted =
			isInterpolated === 0 || wanted === 'all' || wanted.includes(biasOf(conditionKey));
		return isWanted ? [id] : [];
	});
	const stored = await db.select().from(distribution).where(inArray(distribution.id, ids));
	const computed = stored.map((row): Distribution => ({
		...distributionSummary.parse(row.summary),
		...unpackGroups(row.groups)
	}));
	const entered = usableEntered(await findEnteredDistributions(db, at), {
		keys: keys.filter((of) => of.isInterpolated === 0).map(({ conditionKey }) => conditionKey),
		areSweeps: findCharacteristic(at.characteristic)?.measuredAs === 'sweep'
	});
	return [...computed, ...entered]
		.map((of) => ({ condition: readConditionKey(of.conditionKey), distribution: of }))
		.sort((a, b) => (a.condition.reverseVoltage ?? 0) - (b.condition.reverseVoltage ?? 0));
}

function biasOf(conditionKey: string): number {
	return readConditionKey(conditionKey).reverseVoltage ?? Number.NaN;
}
