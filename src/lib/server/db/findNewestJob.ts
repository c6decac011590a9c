import { desc, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Database } from './database';
import { job } from './schema';

const jobProgress = z.object({ done: z.number(), total: z.number(), words: z.string() });

/** The newest job under a key with how far it is, or `undefined` where none ever was. */
export async function findNewestJob(db: Database, dedupeKey: string) {
	const [found] = await db
		.select({ id: job.id, state: job.state, progress: job.progress, error: job.error })
		.from(job)
		.where(eq(job.dedupeKey, dedupeKey))
		.orderBy(desc(job.id))
		.limit(1);
	return found && { ...found, progress: jobProgress.nullable().catch(null).parse(found.progress) };
}
