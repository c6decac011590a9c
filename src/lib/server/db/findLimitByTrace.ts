import { desc, eq, inArray } from 'drizzle-orm';
import { limitRow, type LimitRow } from '$lib/core/limits/limit';
import type { Database } from './database';
import { limitMemo } from './schema';

/** The stored limit behind a printed number, by its trace (`inputHash`), or `undefined`. */
export async function findLimitByTrace(
	db: Database,
	inputHash: string
): Promise<LimitRow | undefined> {
	const [found] = await db
		.select({ result: limitMemo.result })
		.from(limitMemo)
		.where(eq(limitMemo.inputHash, inputHash))
		.orderBy(desc(limitMemo.id))
		.limit(1);
	return found === undefined ? undefined : limitRow.parse(found.result);
}

/** The stored limits among these traces, by trace. */
export async function findLimitsByTrace(
	db: Database,
	inputHashes: readonly string[]
): Promise<Map<string, LimitRow>> {
	const found = await db
		.select({ result: limitMemo.result })
		.from(limitMemo)
		.where(inArray(limitMemo.inputHash, [...inputHashes]));
	return new Map(
		found.map(({ result }) => {
			const row = limitRow.parse(result);
			return [row.inputHash, row];
		})
	);
}
