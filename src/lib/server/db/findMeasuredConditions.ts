import { and, eq, sql } from 'drizzle-orm';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import type { Database } from './database';
import { distribution } from './schema';

/** One temperature and frequency with the biases measured there, all ascending. */
export interface MeasuredConditions {
	readonly temperatureCelsius: number;
	readonly frequency: number | undefined;
	readonly biases: readonly number[];
}

/** Where a characteristic of a product was measured, of the basis given: nothing interpolated. */
export async function findMeasuredConditions(
	db: Database,
	at: { readonly product: number; readonly basisHash: string; readonly characteristic: string }
): Promise<MeasuredConditions[]> {
	const stored = await db
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
	const found = new Map<
		string,
		{ temperatureCelsius: number; frequency: number | undefined; biases: number[] }
	>();
	for (const { conditionKey } of stored) {
		const { temperatureCelsius, frequency, reverseVoltage } = readConditionKey(conditionKey);
		const key = `${temperatureCelsius};${frequency}`;
		const group = found.get(key) ?? { temperatureCelsius, frequency, biases: [] };
		if (reverseVoltage !== undefined) group.biases.push(reverseVoltage);
		found.set(key, group);
	}
	return [...found.values()]
		.map((group) => ({ ...group, biases: group.biases.sort((a, b) => a - b) }))
		.sort(
			(a, b) =>
				a.temperatureCelsius - b.temperatureCelsius || (a.frequency ?? 0) - (b.frequency ?? 0)
		);
}
