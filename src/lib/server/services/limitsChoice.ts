import { BASES, type Basis } from '$lib/core/limits/basis';
import { readNumber } from '$lib/core/units/readNumber';
import type { Database } from '../db/database';
import { findPolicyVersion, listPolicies, type StoredPolicy } from '../db/findPolicies';

/** By which policy, and behind which basis, a page shows its limits. */
export interface LimitsChoice {
	readonly policies: readonly StoredPolicy[];
	/** `undefined` while there is no policy at all. */
	readonly policy: StoredPolicy | undefined;
	readonly basis: Basis;
}

/** What the address chooses by `policy` and `basis`; the first policy, characterized, otherwise. */
export async function limitsChoice(db: Database, search: URLSearchParams): Promise<LimitsChoice> {
	const policies = await listPolicies(db);
	const id = readNumber(search.get('policy') ?? '');
	const asked = id === undefined ? undefined : await findPolicyVersion(db, id);
	return {
		policies,
		policy: asked ?? policies[0],
		basis: BASES.find((known) => known === search.get('basis')) ?? 'characterized'
	};
}
