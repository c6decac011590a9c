import { fail, redirect } from '@sveltejs/kit';
import { setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { policyFields, policyForm, policyRulesOf } from '$lib/forms/policyForm';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listPolicies } from '$lib/server/db/findPolicies';
import { savePolicy } from '$lib/server/services/savePolicy';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	requirePermission(locals, 'policy.manage');
	const [like] = await listPolicies(locals.db);
	const fields = like === undefined ? {} : { ...policyFields(like.rules, 0), name: '' };
	return { form: await superValidate(fields, zod4(policyForm), { errors: false }) };
};

export const actions: Actions = {
	save: async ({ locals, request }) => {
		const person = requirePermission(locals, 'policy.manage');
		const form = await superValidate(request, zod4(policyForm));
		if (!form.valid) return fail(400, { form });
		const outcome = await savePolicy(locals, { rules: policyRulesOf(form.data), by: person.id });
		if (outcome.status === 'refused') return setError(form, outcome.field ?? '', outcome.message);
		redirect(303, `/administration/policies/${outcome.policy}`);
	}
};
