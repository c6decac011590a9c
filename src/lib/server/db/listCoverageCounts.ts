import { and, eq, sql } from 'drizzle-orm';
import { unpackGroups } from '$lib/core/distributions/packGroups';
import type { Database } from './database';
import { distribution } from './schema';

/** A measured condition with the devices of each independent lot; bounds count in `sampleSize` only. */
export interface MeasuredCount {
	readonly characteristic: string;
	readonly conditionKey: string;
	readonly sampleSize: number;
	readonly lots: readonly { readonly name: string; readonly devices: number }[];
}

/** What was measured of a product at each condition, of the basis given: nothing interpolated. */
export async function listCoverageCounts(
	db: Database,
	at: { readonly product: number; readonly basisHash: string }
): Promise<MeasuredCount[]> {
	const stored = await db
		.select({
			characteristic: distribution.characteristic,
			conditionKey: distribution.conditionKey,
			sampleSize: sql<number>`json_extract(${distribution.summary}, '$.sampleSize')`,
			groups: distribution.groups
		})
		.from(distribution)
		.where(
			and(
				eq(distribution.product, at.product),
				eq(distribution.basisHash, at.basisHash),
				sql`json_extract(${distribution.summary}, '$.interpolated') = 0`
			)
		);
	return stored.map(({ groups, ...of }) => {
		const lots = new Map<string, number>();
		for (const { waferLot, sampleSize } of unpackGroups(groups).groups)
			lots.set(waferLot, (lots.get(waferLot) ?? 0) + sampleSize);
		return { ...of, lots: [...lots].map(([name, devices]) => ({ name, devices })) };
	});
}
