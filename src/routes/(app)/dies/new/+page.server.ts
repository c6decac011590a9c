import { fail, redirect } from '@sveltejs/kit';
import { setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { dieFactsOf, dieForm, newDie, presetFields } from '$lib/forms/dieForm';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { saveDie } from '$lib/server/services/saveDie';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	requirePermission(locals, 'product.edit');
	return { form: await superValidate(newDie(), zod4(dieForm), { errors: false }) };
};

export const actions: Actions = {
	save: async ({ locals, request }) => {
		const person = requirePermission(locals, 'product.edit');
		const form = await superValidate(request, zod4(dieForm));
		if (!form.valid) return fail(400, { form });

		const outcome = await saveDie(locals, {
			id: null,
			rowVersion: 0,
			name: form.data.name,
			facts: dieFactsOf(form.data),
			by: person.id
		});
		switch (outcome.status) {
			case 'saved':
				return redirect(303, '/dies');
			case 'refused':
				return setError(form, outcome.field, outcome.message);
			case 'stale':
				throw new Error('a new die has no earlier version');
			default:
				return outcome satisfies never;
		}
	},
	fill: async ({ locals, request }) => {
		requirePermission(locals, 'product.edit');
		const form = await superValidate(request, zod4(dieForm), { errors: false });
		return { form: { ...form, data: { ...form.data, ...presetFields(form.data.preset) } } };
	}
};
