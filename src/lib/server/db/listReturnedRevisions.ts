import { and, asc, count, eq, gt, notExists } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import type { Database } from './database';
import { comment, decision, person, product, revision } from './schema';

/** Returned revisions that no later one followed, submitted by this person: drafts to go on with. */
export function listReturnedRevisions(db: Database, submitter: string) {
	const later = alias(revision, 'later');
	const successor = db
		.select({ id: later.id })
		.from(later)
		.where(and(eq(later.product, revision.product), gt(later.number, revision.number)));
	return db
		.select({
			partNumber: product.partNumber,
			number: revision.number,
			returnedByName: person.name,
			reason: decision.reason,
			since: decision.at,
			comments: count(comment.id)
		})
		.from(revision)
		.innerJoin(product, eq(revision.product, product.id))
		.innerJoin(decision, and(eq(decision.revision, revision.id), eq(decision.event, 'return')))
		.innerJoin(person, eq(decision.by, person.id))
		.leftJoin(comment, eq(comment.revision, revision.id))
		.where(
			and(eq(revision.state, 'returned'), eq(revision.submittedBy, submitter), notExists(successor))
		)
		.groupBy(revision.id)
		.orderBy(asc(decision.at));
}
