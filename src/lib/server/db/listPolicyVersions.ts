import { desc, eq } from 'drizzle-orm';
import { limitPolicy, type LimitPolicy } from '$lib/core/limits/policy';
import type { Database } from './database';
import { person, policyVersion } from './schema';

export interface PolicyHistory {
	readonly id: number;
	readonly number: number;
	readonly rules: LimitPolicy;
	/** ISO 8601, UTC */
	readonly createdAt: string;
	/** Name of who made it; `null` for what the installation brought. */
	readonly createdBy: string | null;
}

/** Every version of a policy, newest first; empty for one that isn't there. */
export async function listPolicyVersions(db: Database, policy: string): Promise<PolicyHistory[]> {
	const rows = await db
		.select({
			id: policyVersion.id,
			number: policyVersion.number,
			json: policyVersion.json,
			createdAt: policyVersion.createdAt,
			createdBy: person.name
		})
		.from(policyVersion)
		.leftJoin(person, eq(person.id, policyVersion.createdBy))
		.where(eq(policyVersion.policy, policy))
		.orderBy(desc(policyVersion.number));
	return rows.map(({ json, ...row }) => ({ ...row, rules: limitPolicy.parse(json) }));
}
