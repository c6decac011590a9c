import { asc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { comment, person } from './schema';

/** The comments on a revision and its rows, oldest first. */
export function listComments(db: Database, revision: number) {
	return db
		.select({
			id: comment.id,
			row: comment.row,
			text: comment.text,
			at: comment.at,
			byName: person.name
		})
		.from(comment)
		.innerJoin(person, eq(comment.by, person.id))
		.where(eq(comment.revision, revision))
		.orderBy(asc(comment.id));
}
