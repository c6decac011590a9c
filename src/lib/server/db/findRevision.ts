import { and, eq, type SQL } from 'drizzle-orm';
import type { Database } from './database';
import { person, product, revision } from './schema';

export type FoundRevision = NonNullable<Awaited<ReturnType<typeof findRevisionById>>>;

/** The revision of a product with this number, or `undefined`. */
export function findRevision(db: Database, partNumber: string, number: number) {
	return findOne(db, and(eq(product.partNumber, partNumber), eq(revision.number, number)));
}

/** The revision with this id, or `undefined`. */
export function findRevisionById(db: Database, id: number) {
	return findOne(db, eq(revision.id, id));
}

async function findOne(db: Database, where: SQL | undefined) {
	const [found] = await db
		.select({
			id: revision.id,
			number: revision.number,
			product: product.id,
			partNumber: product.partNumber,
			document: revision.document,
			sha256: revision.sha256,
			state: revision.state,
			submittedBy: revision.submittedBy,
			submittedByName: person.name,
			submittedAt: revision.submittedAt,
			editors: revision.editors
		})
		.from(revision)
		.innerJoin(product, eq(revision.product, product.id))
		.innerJoin(person, eq(revision.submittedBy, person.id))
		.where(where)
		.limit(1);
	return found;
}
