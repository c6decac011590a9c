import { and, eq, inArray } from 'drizzle-orm';
import { OPEN_REVISION_STATES } from '$lib/core/review/states';
import type { Database } from './database';
import { revision } from './schema';

/** The revision of a product that is in review or approved, or `undefined`. */
export async function findOpenRevision(db: Database, product: number) {
	const [found] = await db
		.select({ id: revision.id, number: revision.number, state: revision.state })
		.from(revision)
		.where(and(eq(revision.product, product), inArray(revision.state, OPEN_REVISION_STATES)))
		.limit(1);
	return found;
}
