import { asc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { decision, person } from './schema';

/** What was decided on a revision, in order. */
export function listDecisions(db: Database, revision: number) {
	return db
		.select({
			event: decision.event,
			reason: decision.reason,
			by: decision.by,
			byName: person.name,
			at: decision.at
		})
		.from(decision)
		.innerJoin(person, eq(decision.by, person.id))
		.where(eq(decision.revision, revision))
		.orderBy(asc(decision.id));
}
