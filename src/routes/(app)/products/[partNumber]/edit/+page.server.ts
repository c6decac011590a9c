import { error, fail, redirect } from '@sveltejs/kit';
import { message, setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { productMessages } from '$lib/core/messages/products';
import { CLASS_NAMES } from '$lib/core/template/template';
import { changedFields } from '$lib/forms/changedFields';
import {
	orderingCodesOf,
	PRODUCT_FIELD_NAMES,
	productFields,
	productForm,
	rowToRemove,
	withoutRow,
	withRow
} from '$lib/forms/productForm';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProduct } from '$lib/server/db/findProduct';
import { listDieNames } from '$lib/server/db/listDieNames';
import { saveProduct } from '$lib/server/services/saveProduct';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	requirePermission(locals, 'product.edit');
	const stored = await findProduct(locals.db, params.partNumber);
	if (stored === undefined) error(404, productMessages.productNotFound(params.partNumber));
	return {
		dies: await listDieNames(locals.db),
		form: await superValidate(productFields(stored), zod4(productForm), { errors: false })
	};
};

/** A die and a class are stored by key; people know them by name. */
const spokenAs = (field: string, names: { readonly die: string; readonly class: string }) =>
	field === 'die' || field === 'class' ? { saved: names[field] } : {};

export const actions: Actions = {
	save: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'product.edit');
		const form = await superValidate(request, zod4(productForm));
		if (!form.valid) return fail(400, { form });

		const { die, productClass, package: body, description, rowVersion } = form.data;
		const outcome = await saveProduct(locals, {
			isNew: false,
			rowVersion,
			by: person.id,
			partNumber: params.partNumber,
			die,
			elements: Number(form.data.elements),
			productClass,
			package: body,
			description,
			orderingCodes: orderingCodesOf(form.data)
		});
		switch (outcome.status) {
			case 'saved':
				return redirect(303, `/products/${encodeURIComponent(params.partNumber)}/measurements`);
			case 'refused':
				return typeof outcome.field === 'object'
					? setError(form, `code[${outcome.field.code}]`, outcome.message)
					: setError(form, outcome.field, outcome.message);
			case 'stale': {
				const { saved } = outcome;
				const names = { die: saved.dieName, class: CLASS_NAMES[saved.productClass] };
				const changes = changedFields(form.data, productFields(saved), PRODUCT_FIELD_NAMES).map(
					(change) => ({ ...change, ...spokenAs(change.name, names) })
				);
				form.data.rowVersion = saved.rowVersion;
				return message(form, productMessages.changedMeanwhile(changes), { status: 409 });
			}
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
