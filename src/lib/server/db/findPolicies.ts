import { asc, eq } from 'drizzle-orm';
import { limitPolicy, type PolicyVersion } from '$lib/core/limits/policy';
import type { Database } from './database';
import { policyVersion } from './schema';

/** A policy version with the hash of its rules, by which limits depend on it. */
export interface StoredPolicy extends PolicyVersion {
	readonly hash: string;
}

/** The newest version of every policy, in the order they were made. */
export async function listPolicies(db: Database): Promise<StoredPolicy[]> {
	const stored = await db.select().from(policyVersion).orderBy(asc(policyVersion.id));
	const newest = new Map<string, StoredPolicy>();
	for (const row of stored) newest.set(row.policy, parsed(row));
	return [...newest.values()];
}

/** The policy version with this id, newest or not, or `undefined`. */
export async function findPolicyVersion(
	db: Database,
	id: number
): Promise<StoredPolicy | undefined> {
	const [found] = await db.select().from(policyVersion).where(eq(policyVersion.id, id)).limit(1);
	return found === undefined ? undefined : parsed(found);
}

function parsed(row: typeof policyVersion.$inferSelect): StoredPolicy {
	return {
		id: row.id,
		policy: row.policy,
		number: row.number,
		rules: limitPolicy.parse(row.json),
		hash: row.hash
	};
}
