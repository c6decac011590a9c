import { json } from '@sveltejs/kit';
import { enteredRequest } from '$lib/core/distributions/enteredRequest';
import { distributionMessages } from '$lib/core/messages/distributions';
import { productNotFound } from '$lib/core/messages/review';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { listEnteredDistributions } from '$lib/server/db/listEnteredDistributions';
import { problem } from '$lib/server/problem';
import { enterDistribution } from '$lib/server/services/enterDistribution';
import type { RequestHandler } from './$types';

const STATUS = { noProduct: 404, notAnswerable: 422, measured: 409 } as const;

/** Every distribution entered for a product, newest first, with its reason and source. */
export const GET: RequestHandler = async ({ locals, params }) => {
	requirePermission(locals, 'measurement.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, productNotFound(params.partNumber));
	return json({ entered: await listEnteredDistributions(locals.db, product.id) });
};

/** Enters a distribution of which only a summary exists. */
export const POST: RequestHandler = async ({ locals, params, request }) => {
	const person = requirePermission(locals, 'measurement.upload');
	const body: unknown = await request.json().catch(() => undefined);
	const asked = enteredRequest.safeParse(body);
	if (!asked.success) {
		return problem(400, distributionMessages.notADistribution(), {
			errors: asked.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }))
		});
	}
	const outcome = await enterDistribution(locals, {
		...asked.data,
		partNumber: params.partNumber,
		by: person.id
	});
	if (outcome.status === 'refused') return problem(STATUS[outcome.why], outcome.message);
	const { conditionKey, typical } = outcome;
	return json({ conditionKey, typical, origin: 'entered' }, { status: 201 });
};
