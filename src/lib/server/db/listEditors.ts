import { and, eq, gte, max } from 'drizzle-orm';
import type { Database } from './database';
import { draft, draftEdit, revision } from './schema';

/**
 * Ids of everybody who edited a product's draft since its last release. Counted from the moment the
 * released revision was submitted: what was edited while that one was under review went into no
 * release yet.
 */
export async function listEditors(db: Database, product: number): Promise<string[]> {
	const [released] = await db
		.select({ since: max(revision.submittedAt) })
		.from(revision)
		.where(and(eq(revision.product, product), eq(revision.state, 'published')));
	const editors = await db
		.selectDistinct({ person: draftEdit.person })
		.from(draftEdit)
		.innerJoin(draft, eq(draftEdit.draft, draft.id))
		.where(and(eq(draft.product, product), gte(draftEdit.at, released?.since ?? '')));
	return editors.map(({ person }) => person).toSorted();
}
