import { json } from '@sveltejs/kit';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { productSummary } from '$lib/server/services/productSummary';
import { listProductRows } from '$lib/server/services/productTable';
import type { RequestHandler } from './$types';

/** Every product, by part number. */
export const GET: RequestHandler = async ({ locals }) => {
	requirePermission(locals, 'product.read');
	const rows = await listProductRows(locals.db, new Date().toISOString().slice(0, 10));
	return json({ products: rows.map(productSummary) });
};
