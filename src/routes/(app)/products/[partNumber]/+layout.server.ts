import { error } from '@sveltejs/kit';
import { productMessages } from '$lib/core/messages/products';
import { datasheetStateText, type DatasheetState } from '$lib/core/review/datasheetState';
import { isPermitted } from '$lib/core/review/permissions';
import { CLASS_NAMES } from '$lib/core/template/template';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProduct } from '$lib/server/db/findProduct';
import { listDatasheetStates } from '$lib/server/db/listDatasheetStates';
import type { LayoutServerLoad } from './$types';

const NO_DATASHEET: DatasheetState = { release: null, openRevision: null, draft: null };

/** The header that all pages of a product share. */
export const load: LayoutServerLoad = async ({ locals, params, depends }) => {
	depends('platen:data');
	const person = requirePermission(locals, 'product.read');
	const product = await findProduct(locals.db, params.partNumber);
	if (product === undefined) error(404, productMessages.productNotFound(params.partNumber));
	const today = new Date().toISOString().slice(0, 10);
	const states = await listDatasheetStates(locals.db, today, product.id);
	const datasheet = states.get(product.id) ?? NO_DATASHEET;
	return {
		header: {
			partNumber: product.partNumber,
			className: CLASS_NAMES[product.productClass],
			package: product.package,
			description: product.description,
			status: datasheet.draft,
			datasheet: datasheetStateText(datasheet)
		},
		canEditProduct: isPermitted(person.roles, 'product.edit')
	};
};
