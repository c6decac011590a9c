import { desc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { person, revision } from './schema';

/** Every revision of a product, newest first, without its document. */
export function listRevisions(db: Database, product: number) {
	return db
		.select({
			id: revision.id,
			number: revision.number,
			state: revision.state,
			sha256: revision.sha256,
			submittedAt: revision.submittedAt,
			submittedByName: person.name
		})
		.from(revision)
		.innerJoin(person, eq(revision.submittedBy, person.id))
		.where(eq(revision.product, product))
		.orderBy(desc(revision.number));
}
