import { asc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { draft, policyVersion, product } from './schema';

/** Which products' drafts bind by which version of a policy, by part number. */
export function listPolicyUses(db: Database, policy: string) {
	return db
		.select({ number: policyVersion.number, partNumber: product.partNumber })
		.from(draft)
		.innerJoin(policyVersion, eq(draft.policyVersion, policyVersion.id))
		.innerJoin(product, eq(draft.product, product.id))
		.where(eq(policyVersion.policy, policy))
		.orderBy(asc(product.partNumber));
}
