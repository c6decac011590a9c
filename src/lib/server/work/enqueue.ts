import { and, eq, inArray } from 'drizzle-orm';
import type { Database } from '../db/database';
import { job } from '../db/schema';

export interface NewJob {
	readonly kind: string;
	readonly payload: unknown;
	/** While a job with this key is open, it stands for this one. */
	readonly dedupeKey: string;
	readonly by: string | null;
}

/** Puts a job into the queue, in the transaction that needs it; answers the job's id. */
export async function enqueue(tx: Database, wanted: NewJob): Promise<number> {
	const [open] = await tx
		.select({ id: job.id })
		.from(job)
		.where(and(eq(job.dedupeKey, wanted.dedupeKey), inArray(job.state, ['queued', 'running'])))
		.limit(1);
	if (open !== undefined) return open.id;

	const [created] = await tx
		.insert(job)
		.values({
			kind: wanted.kind,
			payload: wanted.payload,
			dedupeKey: wanted.dedupeKey,
			createdBy: wanted.by,
			state: 'queued',
			createdAt: new Date().toISOString()
		})
		.returning({ id: job.id });
	if (created === undefined) throw new Error('the job was not stored');
	return created.id;
}
