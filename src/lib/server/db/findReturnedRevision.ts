import { and, desc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { decision, person, revision } from './schema';

/** The newest revision of a product when it was returned, with who returned it and why. */
export async function findReturnedRevision(db: Database, product: number) {
	const [newest] = await db
		.select({ id: revision.id, number: revision.number, state: revision.state })
		.from(revision)
		.where(eq(revision.product, product))
		.orderBy(desc(revision.number))
		.limit(1);
	if (newest?.state !== 'returned') return undefined;
	const [returned] = await db
		.select({ reason: decision.reason, at: decision.at, byName: person.name })
		.from(decision)
		.innerJoin(person, eq(decision.by, person.id))
		.where(and(eq(decision.revision, newest.id), eq(decision.event, 'return')))
		.orderBy(desc(decision.id))
		.limit(1);
	return returned && { id: newest.id, number: newest.number, ...returned };
}
