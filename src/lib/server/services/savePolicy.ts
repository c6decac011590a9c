import { desc, eq } from 'drizzle-orm';
import { limitPolicy, type LimitPolicy } from '$lib/core/limits/policy';
import { policyText } from '$lib/core/limits/policyText';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';
import { appendAudit } from '../db/appendAudit';
import { listPolicies } from '../db/findPolicies';
import { policyVersion } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { sha256 } from './sha256';

export type SavePolicyOutcome =
	| {
			readonly status: 'saved';
			readonly policy: string;
			readonly number: number;
			readonly id: number;
	  }
	| {
			readonly status: 'refused';
			readonly field: 'name' | null;
			readonly message: string;
			/** The newest version, where somebody made one meanwhile. */
			readonly newest?: number;
	  };

/**
 * Makes a policy, or the next version of one. Versions are never changed: what used an older one
 * keeps it.
 */
export async function savePolicy(
	{ db }: Pick<Stores, 'db'>,
	wanted: {
		/** Key of the policy that gets a version; a new policy, unless given. */
		readonly policy?: string | undefined;
		/** Number of the version that was seen. */
		readonly seen?: number | undefined;
		readonly rules: LimitPolicy;
		/** Id of the person who saves. */
		readonly by: string;
	}
): Promise<SavePolicyOutcome> {
	const rules = limitPolicy.parse(wanted.rules);
	const hash = sha256(policyText(rules));
	const at = new Date().toISOString();
	return write(db, async (tx): Promise<SavePolicyOutcome> => {
		const policies = await listPolicies(tx);
		const policy = wanted.policy ?? keyOf(rules.name);
		if (policy === '') return refused('name', limitsScreenMessages.policyNameWithoutLetters());
		const isTaken = policies.some(
			(of) =>
				(of.policy !== wanted.policy && of.rules.name === rules.name) ||
				(wanted.policy === undefined && of.policy === policy)
		);
		if (isTaken) return refused('name', limitsScreenMessages.policyNameTaken(rules.name));

		const [newest] = await tx
			.select({ number: policyVersion.number, hash: policyVersion.hash })
			.from(policyVersion)
			.where(eq(policyVersion.policy, policy))
			.orderBy(desc(policyVersion.number))
			.limit(1);
		if (wanted.policy !== undefined && newest === undefined) {
			return refused(null, limitsScreenMessages.policyNotFound());
		}
		if (newest !== undefined && newest.number !== wanted.seen) {
			const message = limitsScreenMessages.policyMovedMeanwhile(newest.number);
			return { ...refused(null, message), newest: newest.number };
		}
		if (newest?.hash === hash) {
			return refused(null, limitsScreenMessages.policyUnchanged(rules.name));
		}
		const number = (newest?.number ?? 0) + 1;
		const [made] = await tx
			.insert(policyVersion)
			.values({ policy, number, json: rules, hash, createdAt: at, createdBy: wanted.by })
			.returning({ id: policyVersion.id });
		await appendAudit(tx, {
			action: number === 1 ? 'policy.create' : 'policy.version',
			subject: `${rules.name} version ${number}`,
			by: wanted.by,
			details: { policy, number, hash }
		});
		return { status: 'saved', policy, number, id: made?.id ?? 0 };
	});
}

const refused = (field: 'name' | null, message: string) =>
	({ status: 'refused', field, message }) as const;

/** `Tested, one lot` is kept as `tested-one-lot`. */
function keyOf(name: string): string {
	return name
		.toLowerCase()
		.replace(/[^a-z0-9]+/g, '-')
		.replace(/^-|-$/g, '');
}
