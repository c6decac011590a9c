import { eq } from 'drizzle-orm';
import type { Database } from './database';
import { job } from './schema';

/** The job with this id, or `undefined`. */
export async function findJob(db: Database, id: number) {
	const [found] = await db.select().from(job).where(eq(job.id, id)).limit(1);
	return found;
}
