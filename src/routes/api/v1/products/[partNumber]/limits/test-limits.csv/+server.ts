import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { problem } from '$lib/server/problem';
import { testLimitsCsv } from '$lib/server/services/testLimitsCsv';
import type { RequestHandler } from './$types';

/** The test limits by `policy` and `basis`, as CSV. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, limitMessages.noSuchProduct(params.partNumber));
	return new Response(await testLimitsCsv(locals.db, product, url.searchParams), {
		headers: { 'content-type': 'text/csv; charset=utf-8' }
	});
};
