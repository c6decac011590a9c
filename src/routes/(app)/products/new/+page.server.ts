import { fail, redirect } from '@sveltejs/kit';
import { setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import {
	orderingCodesOf,
	productForm,
	rowToRemove,
	withoutRow,
	withRow
} from '$lib/forms/productForm';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listDieNames } from '$lib/server/db/listDieNames';
import { saveProduct } from '$lib/server/services/saveProduct';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	requirePermission(locals, 'product.edit');
	return { dies: await listDieNames(locals.db), form: await superValidate(zod4(productForm)) };
};

export const actions: Actions = {
	save: async ({ locals, request }) => {
		const person = requirePermission(locals, 'product.edit');
		const form = await superValidate(request, zod4(productForm));
		if (!form.valid) return fail(400, { form });

		const { partNumber, die, productClass, package: body, description } = form.data;
		const outcome = await saveProduct(locals, {
			isNew: true,
			rowVersion: 0,
			by: person.id,
			partNumber,
			die,
			elements: Number(form.data.elements),
			productClass,
			package: body,
			description,
			orderingCodes: orderingCodesOf(form.data)
		});
		switch (outcome.status) {
			case 'saved':
				return redirect(303, `/products/${encodeURIComponent(outcome.partNumber)}/measurements`);
			case 'refused':
				return typeof outcome.field === 'object'
					? setError(form, `code[${outcome.field.code}]`, outcome.message)
					: setError(form, outcome.field, outcome.message);
			case 'stale':
				throw new Error('a new product has no earlier version');
			default:
				return outcome satisfies never;
		}
	},
	addRow: async ({ locals, request }) => {
		requirePermission(locals, 'product.edit');
		const form = await superValidate(request, zod4(productForm), { errors: false });
		return { form: { ...form, data: withRow(form.data) } };
	},
	removeRow: async ({ locals, request }) => {
		requirePermission(locals, 'product.edit');
		const entries = await request.formData();
		const form = await superValidate(entries, zod4(productForm), { errors: false });
		return { form: { ...form, data: withoutRow(form.data, rowToRemove(entries)) } };
	}
};
