import { cvMessages } from '$lib/core/messages/cv';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { problem } from '$lib/server/problem';
import { chosenCurve } from '$lib/server/services/chosenCurve';
import { medianSpice } from '$lib/server/services/medianSpice';
import type { RequestHandler } from './$types';

/** The SPICE model of the median device at the temperature and frequency of the address. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, limitMessages.noSuchProduct(params.partNumber));
	const { curve } = await chosenCurve(locals.db, product, url.searchParams);
	if (curve === undefined) return problem(409, limitMessages.noDistributions());
	const text = medianSpice(product, curve);
	if (text === undefined) return problem(409, cvMessages.noModel());

	const name = `${product.partNumber}-${curve.temperatureCelsius}C.lib`;
	return new Response(text, {
		headers: {
			'content-type': 'text/plain; charset=utf-8',
			'content-disposition': `attachment; filename="${encodeURIComponent(name)}"`
		}
	});
};
