import { describePolicy } from '$lib/core/limits/describePolicy';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listPolicies } from '$lib/server/db/findPolicies';
import { listPolicyUses } from '$lib/server/db/listPolicyUses';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, depends }) => {
	requirePermission(locals, 'policy.manage');
	depends('platen:data');
	const policies = await listPolicies(locals.db);
	return {
		policies: await Promise.all(
			policies.map(async ({ policy, number, rules }) => {
				const uses = await listPolicyUses(locals.db, policy);
				return {
					policy,
					number,
					name: rules.name,
					method: rules.method,
					words: describePolicy(rules),
					drafts: uses.length,
					older: uses.filter((use) => use.number < number).map((use) => use.partNumber)
				};
			})
		)
	};
};
