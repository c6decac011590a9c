import { json } from '@sveltejs/kit';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { problem } from '$lib/server/problem';
import { chosenCurve } from '$lib/server/services/chosenCurve';
import { curveBand } from '$lib/server/services/curveBand';
import type { RequestHandler } from './$types';

/** Limits and median of the curve at and between the measured biases, before rounding. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, limitMessages.noSuchProduct(params.partNumber));
	const { curve } = await chosenCurve(locals.db, product, url.searchParams);
	if (curve === undefined || product.basisHash === null)
		return problem(409, limitMessages.noDistributions());

	const points = await curveBand(locals.db, curve, {
		product: product.id,
		basisHash: product.basisHash
	});
	return json({ unit: curve.unit, points });
};
