import { csvText } from '$lib/core/csvText';
import { readProductFilter } from '$lib/forms/productFilter';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listProductRows, selectProducts } from '$lib/server/services/productTable';
import type { RequestHandler } from './$types';

const HEAD = [
	'part_number',
	'class',
	'description',
	'package',
	'die',
	'elements',
	'independent_lots',
	'measured_temperatures_celsius',
	'datasheet'
];

/** The table of products as it is narrowed and sorted on the screen. */
export const GET: RequestHandler = async ({ locals, url }) => {
	requirePermission(locals, 'product.read');
	const rows = selectProducts(
		await listProductRows(locals.db, new Date().toISOString().slice(0, 10)),
		readProductFilter(url.searchParams)
	);
	const lines = rows.map((row) => [
		row.partNumber,
		row.className,
		row.description,
		row.package,
		row.dieName,
		row.elements,
		row.lots,
		row.temperaturesCelsius.join(' '),
		row.datasheetText
	]);
	return new Response(csvText([HEAD, ...lines]), {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': 'attachment; filename="products.csv"'
		}
	});
};
