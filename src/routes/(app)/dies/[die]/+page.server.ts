import { error, fail, redirect } from '@sveltejs/kit';
import { message, setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { productMessages } from '$lib/core/messages/products';
import { changedFields } from '$lib/forms/changedFields';
import { DIE_FIELD_NAMES, dieFactsOf, dieFields, dieForm, presetFields } from '$lib/forms/dieForm';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findDie } from '$lib/server/db/findDie';
import { saveDie } from '$lib/server/services/saveDie';
import type { Actions, PageServerLoad } from './$types';

const idOf = (text: string) => (/^\d{1,9}$/.test(text) ? Number(text) : 0);

export const load: PageServerLoad = async ({ locals, params }) => {
	requirePermission(locals, 'product.edit');
	const stored = await findDie(locals.db, idOf(params.die));
	if (stored === undefined) error(404, productMessages.noSuchDie());
	return {
		name: stored.name,
		form: await superValidate(dieFields(stored), zod4(dieForm), { errors: false })
	};
};

export const actions: Actions = {
	save: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'product.edit');
		const form = await superValidate(request, zod4(dieForm));
		if (!form.valid) return fail(400, { form });

		const outcome = await saveDie(locals, {
			id: idOf(params.die),
			rowVersion: form.data.rowVersion,
			name: form.data.name,
			facts: dieFactsOf(form.data),
			by: person.id
		});
		switch (outcome.status) {
			case 'saved':
				return redirect(303, '/dies');
			case 'refused':
				return setError(form, outcome.field, outcome.message);
			case 'stale': {
				const changes = changedFields(form.data, dieFields(outcome.saved), DIE_FIELD_NAMES);
				form.data.rowVersion = outcome.saved.rowVersion;
				return message(form, productMessages.changedMeanwhile(changes), { status: 409 });
			}
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
