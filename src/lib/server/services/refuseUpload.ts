import { eq } from 'drizzle-orm';
import type { UploadProblems } from '$lib/core/measurements/problems';
import type { Connection } from '../db/database';
import { upload } from '../db/schema';
import { write } from '../db/write';

/** Writes down why an upload can't be taken as it is; it can be mapped again. */
export async function refuseUpload(
	db: Connection,
	id: number,
	problems: UploadProblems
): Promise<void> {
	await write(db, (tx) =>
		tx.update(upload).set({ state: 'refused', problems }).where(eq(upload.id, id))
	);
}
