import { eq } from 'drizzle-orm';
import type { Database } from './database';
import { draft } from './schema';

/** Id of the policy version that a product's draft binds by, or `undefined` while there is no draft. */
export async function findDraftPolicy(db: Database, product: number): Promise<number | undefined> {
	const [found] = await db
		.select({ policyVersion: draft.policyVersion })
		.from(draft)
		.where(eq(draft.product, product))
		.limit(1);
	return found?.policyVersion;
}
