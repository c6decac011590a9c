import { json } from '@sveltejs/kit';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listPolicies } from '$lib/server/db/findPolicies';
import type { RequestHandler } from './$types';

/** The newest version of every limit policy, with its rules. */
export const GET: RequestHandler = async ({ locals }) => {
	requirePermission(locals, 'policy.read');
	const policies = await listPolicies(locals.db);
	return json({
		policies: policies.map(({ id, policy, number, rules, hash }) => ({
			id,
			policy,
			number,
			...rules,
			sha256: hash
		}))
	});
};
