import { and, eq } from 'drizzle-orm';
import type { SetCounts } from '$lib/core/measurements/counts';
import { appendAudit } from '../db/appendAudit';
import type { Connection } from '../db/database';
import type { FoundUpload } from '../db/findUpload';
import { lot, measurementSet, upload } from '../db/schema';
import { write } from '../db/write';
import { enqueueDistributions } from './enqueueDistributions';

/** The staged set was removed, or the upload taken, by a newer attempt. */
export class StagedSetGoneError extends Error {
	override readonly name = 'StagedSetGoneError';
	constructor(readonly set: number) {
		super(`the staged set ${set} is gone or its upload was taken by another attempt`);
	}
}

/**
 * Makes a staged set a measurement set, in one transaction with its lots, the upload's state, the
 * audit and the job that computes distributions from it.
 *
 * @throws {StagedSetGoneError} when another attempt was faster
 */
export async function acceptSet(
	db: Connection,
	input: {
		readonly upload: FoundUpload;
		readonly set: number;
		readonly counts: SetCounts;
		readonly by: string;
	}
): Promise<void> {
	const { counts, set, by } = input;
	const at = new Date().toISOString();
	await write(db, async (tx) => {
		const flipped = await tx
			.update(measurementSet)
			.set({ state: 'accepted', counts, acceptedAt: at })
			.where(and(eq(measurementSet.id, set), eq(measurementSet.state, 'importing')))
			.returning({ id: measurementSet.id });
		const taken = await tx
			.update(upload)
			.set({ state: 'accepted', problems: null })
			.where(and(eq(upload.id, input.upload.id), eq(upload.state, 'mapped')))
			.returning({ id: upload.id });
		if (flipped.length === 0 || taken.length === 0) throw new StagedSetGoneError(set);

		const lots = counts.lotNames.map(({ lot: name, waferLot }) => ({
			product: input.upload.product,
			name,
			waferLot
		}));
		await tx.insert(lot).values(lots).onConflictDoNothing();
		await appendAudit(tx, {
			action: 'measurementSet.accept',
			subject: `${input.upload.partNumber} ${input.upload.fileName}`,
			by,
			details: {
				set,
				upload: input.upload.id,
				devices: counts.devices,
				points: counts.points,
				suspects: counts.suspects,
				skippedLines: counts.skippedLines
			}
		});
		await enqueueDistributions(tx, input.upload.product, by);
	});
}
