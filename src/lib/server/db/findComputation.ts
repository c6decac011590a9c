import { and, desc, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import type { Database } from './database';
import { job } from './schema';

const progress = z.object({ done: z.number(), total: z.number(), words: z.string() });

/** The newest computation of a product's distributions: its state, and how far it is. */
export async function findComputation(db: Database, product: number) {
	const [found] = await db
		.select({ state: job.state, progress: job.progress, error: job.error })
		.from(job)
		.where(
			and(
				eq(job.kind, 'compute-distributions'),
				eq(sql`json_extract(${job.payload}, '$.product')`, product)
			)
		)
		.orderBy(desc(job.id))
		.limit(1);
	return (
		found && {
			isOpen: found.state === 'queued' || found.state === 'running',
			error: found.state === 'failed' ? found.error : null,
			progress: progress.nullable().catch(null).parse(found.progress)
		}
	);
}
