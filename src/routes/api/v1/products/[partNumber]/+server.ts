import { error, json } from '@sveltejs/kit';
import { productMessages } from '$lib/core/messages/products';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { describeProduct } from '$lib/server/services/productSummary';
import type { RequestHandler } from './$types';

/** One product with its die and ordering codes. */
export const GET: RequestHandler = async ({ locals, params }) => {
	requirePermission(locals, 'product.read');
	const today = new Date().toISOString().slice(0, 10);
	const described = await describeProduct(locals.db, params.partNumber, today);
	if (described === undefined) error(404, productMessages.productNotFound(params.partNumber));
	return json(described);
};
