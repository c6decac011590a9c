import { isPermitted } from '$lib/core/review/permissions';
import { readProductFilter } from '$lib/forms/productFilter';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listProductRows, selectProducts } from '$lib/server/services/productTable';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url, depends }) => {
	depends('platen:data');
	const person = requirePermission(locals, 'product.read');
	const filter = readProductFilter(url.searchParams);
	const rows = await listProductRows(locals.db, new Date().toISOString().slice(0, 10));
	return {
		rows: selectProducts(rows, filter),
		total: rows.length,
		packages: [...new Set(rows.map((row) => row.package))].toSorted(),
		filter,
		sorting: { column: filter.column, order: filter.order },
		canEdit: isPermitted(person.roles, 'product.edit')
	};
};
