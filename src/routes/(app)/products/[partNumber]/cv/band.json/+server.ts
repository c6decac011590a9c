import { json } from '@sveltejs/kit';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { problem } from '$lib/server/problem';
import { chosenCurve } from '$lib/server/services/chosenCurve';
import { smoothBand } from '$lib/server/services/smoothBand';
import type { RequestHandler } from './$types';

/** Limits and median of the curve at and between the measured biases, before rounding. */
export const GET: RequestHandler = async ({ locals, params, url }) => {
	requirePermission(locals, 'limit.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, limitMessages.noSuchProduct(params.partNumber));
	const { choice, curve } = await chosenCurve(locals.db, product, url.searchParams);
	if (curve === undefined || product.basisHash === null || choice.policy === undefined)
		return problem(409, limitMessages.noDistributions());

	const points = await smoothBand(locals.db, curve, {
		product: product.id,
		basisHash: product.basisHash,
		policyVersion: choice.policy.id,
		declaredBasis: choice.basis
	});
	return json({ unit: curve.unit, points });
};
