import { and, eq, inArray } from 'drizzle-orm';
import { engineVersion } from '$lib/core/limits/engineVersion';
import { limitRow, type LimitRow } from '$lib/core/limits/limit';
import type { Connection } from '../db/database';
import { limitMemo } from '../db/schema';
import { write } from '../db/write';

/** The limits computed before, by their input hash. */
export async function rememberedRows(
	db: Connection,
	policyVersion: number,
	inputHashes: readonly string[]
): Promise<Map<string, LimitRow>> {
	if (inputHashes.length === 0) return new Map();
	const found = await db
		.select({ inputHash: limitMemo.inputHash, result: limitMemo.result })
		.from(limitMemo)
		.where(
			and(
				inArray(limitMemo.inputHash, [...inputHashes]),
				eq(limitMemo.policyVersion, policyVersion),
				eq(limitMemo.engineVersion, engineVersion)
			)
		);
	return new Map(found.map(({ inputHash, result }) => [inputHash, limitRow.parse(result)]));
}

/** Keeps limits under everything they depend on. */
export async function rememberRows(db: Connection, rows: readonly LimitRow[]): Promise<void> {
	if (rows.length === 0) return;
	await write(db, (tx) =>
		tx
			.insert(limitMemo)
			.values(
				rows.map((result) => ({
					inputHash: result.inputHash,
					policyVersion: result.policyVersion,
					engineVersion: result.engineVersion,
					result
				}))
			)
			.onConflictDoNothing()
	);
}
