import { error, fail } from '@sveltejs/kit';
import { message, setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { describePolicy } from '$lib/core/limits/describePolicy';
import { policyDifference } from '$lib/core/limits/policyDifference';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';
import { policyFields, policyForm, policyRulesOf } from '$lib/forms/policyForm';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listPolicyUses } from '$lib/server/db/listPolicyUses';
import { listPolicyVersions } from '$lib/server/db/listPolicyVersions';
import { savePolicy } from '$lib/server/services/savePolicy';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, depends }) => {
	requirePermission(locals, 'policy.manage');
	depends('platen:data');
	const versions = await listPolicyVersions(locals.db, params.policy);
	const [newest] = versions;
	if (newest === undefined) error(404, limitsScreenMessages.policyNotFound());
	const fields = policyFields(newest.rules, newest.number);
	return {
		name: newest.rules.name,
		number: newest.number,
		words: describePolicy(newest.rules),
		versions: versions.map(({ number, rules, createdAt, createdBy }, index) => {
			const before = versions[index + 1];
			return {
				number,
				date: createdAt.slice(0, 10),
				by: createdBy,
				changes: before === undefined ? null : policyDifference(before.rules, rules)
			};
		}),
		uses: await listPolicyUses(locals.db, params.policy),
		form: await superValidate(fields, zod4(policyForm), { errors: false })
	};
};

export const actions: Actions = {
	save: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'policy.manage');
		const form = await superValidate(request, zod4(policyForm));
		if (!form.valid) return fail(400, { form });
		const outcome = await savePolicy(locals, {
			policy: params.policy,
			seen: form.data.seen,
			rules: policyRulesOf(form.data),
			by: person.id
		});
		if (outcome.status === 'refused') {
			if (outcome.newest !== undefined) form.data.seen = outcome.newest;
			return setError(form, outcome.field ?? '', outcome.message);
		}
		form.data.seen = outcome.number;
		return message(form, limitsScreenMessages.policySaved(form.data.name, outcome.number));
	}
};
