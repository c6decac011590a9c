import { error } from '@sveltejs/kit';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { testLimitsCsv } from '$lib/server/services/testLimitsCsv';
import type { RequestHandler } from './$types';

/** The test limits of the screen, for a test programme. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));
	return new Response(await testLimitsCsv(locals.db, product, url.searchParams), {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': `attachment; filename="${encodeURIComponent(product.partNumber)}-test-limits.csv"`
		}
	});
};
