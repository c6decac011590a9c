import { desc, eq, lt } from 'drizzle-orm';
import type { Database } from './database';
import { audit, person } from './schema';

/** The audit trail, newest first, from before a row on; one row more than asked shows there is more. */
export function listAudit(db: Database, { before, limit }: { before?: number; limit: number }) {
	return db
		.select({
			seq: audit.seq,
			at: audit.at,
			by: person.name,
			action: audit.action,
			subject: audit.subject,
			details: audit.details,
			hash: audit.hash
		})
		.from(audit)
		.leftJoin(person, eq(person.id, audit.by))
		.where(before === undefined ? undefined : lt(audit.seq, before))
		.orderBy(desc(audit.seq))
		.limit(limit + 1);
}
