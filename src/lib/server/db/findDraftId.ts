import { eq } from 'drizzle-orm';
import type { Database } from './database';
import { draft } from './schema';

/** The id of a product's draft, or `undefined` while there is none. */
export async function findDraftId(db: Database, product: number): Promise<number | undefined> {
	const [found] = await db
		.select({ id: draft.id })
		.from(draft)
		.where(eq(draft.product, product))
		.limit(1);
	return found?.id;
}
