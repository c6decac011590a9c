import { and, eq } from 'drizzle-orm';
import type { Connection } from '../db/database';
import { deviceBlock, measurementSet, readingBlock, suspect, sweepBlock } from '../db/schema';
import { write } from '../db/write';

/**
 * Removes what an import that broke off left staged, block by block, so that no transaction is
 * long. An attempt that is still at work finds its set gone and fails.
 */
export async function clearStagedSets(db: Connection, upload: number): Promise<void> {
	const staged = await db
		.select({ id: measurementSet.id })
		.from(measurementSet)
		.where(and(eq(measurementSet.upload, upload), eq(measurementSet.state, 'importing')));
	for (const { id } of staged) {
		const chunks = await db
			.selectDistinct({ conditionKey: sweepBlock.conditionKey, chunk: sweepBlock.chunk })
			.from(sweepBlock)
			.where(eq(sweepBlock.set, id));
		for (const { conditionKey, chunk } of chunks) {
			await write(db, (tx) =>
				tx
					.delete(sweepBlock)
					.where(
						and(
							eq(sweepBlock.set, id),
							eq(sweepBlock.conditionKey, conditionKey),
							eq(sweepBlock.chunk, chunk)
						)
					)
			);
		}
		const series = await db
			.selectDistinct({
				characteristic: readingBlock.characteristic,
				conditionKey: readingBlock.conditionKey
			})
			.from(readingBlock)
			.where(eq(readingBlock.set, id));
		for (const { characteristic, conditionKey } of series) {
			await write(db, (tx) =>
				tx
					.delete(readingBlock)
					.where(
						and(
							eq(readingBlock.set, id),
							eq(readingBlock.characteristic, characteristic),
							eq(readingBlock.conditionKey, conditionKey)
						)
					)
			);
		}
		await write(db, async (tx) => {
			await tx.delete(suspect).where(eq(suspect.set, id));
			await tx.delete(deviceBlock).where(eq(deviceBlock.set, id));
			await tx.delete(measurementSet).where(eq(measurementSet.id, id));
		});
	}
}
