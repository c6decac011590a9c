import { and, asc, eq, gt, gte, notExists } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import type { Database } from './database';
import { job } from './schema';

/** Jobs of this person that failed since an instant and were not tried again. */
export function listFailedJobs(db: Database, by: string, since: string) {
	const later = alias(job, 'later');
	const successor = db
		.select({ id: later.id })
		.from(later)
		.where(and(eq(later.dedupeKey, job.dedupeKey), gt(later.id, job.id)));
	return db
		.select({
			id: job.id,
			kind: job.kind,
			payload: job.payload,
			error: job.error,
			endedAt: job.endedAt,
			createdAt: job.createdAt
		})
		.from(job)
		.where(
			and(
				eq(job.state, 'failed'),
				eq(job.createdBy, by),
				gte(job.createdAt, since),
				notExists(successor)
			)
		)
		.orderBy(asc(job.createdAt));
}
