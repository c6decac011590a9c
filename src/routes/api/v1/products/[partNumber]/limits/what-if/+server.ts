import { json } from '@sveltejs/kit';
import { whatIfRequest } from '$lib/core/limits/whatIf/whatIfRequest';
import { limitMessages } from '$lib/core/messages/limits';
import { firstProblem, schemaProblems } from '$lib/core/requestProblems';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { problem } from '$lib/server/problem';
import { whatIf } from '$lib/server/services/whatIf';
import type { RequestHandler } from './$types';

/** The limits of one temperature by other rules, beside the stored ones; nothing is stored. */
export const POST: RequestHandler = async ({ locals, params, request }) => {
	requirePermission(locals, 'limit.read');
	const body: unknown = await request.json().catch(() => undefined);
	if (body === undefined) return problem(400, limitMessages.notJson());
	const asked = whatIfRequest.safeParse(body);
	if (!asked.success) {
		const errors = schemaProblems(asked.error);
		return problem(422, firstProblem(errors), { errors });
	}
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, limitMessages.noSuchProduct(params.partNumber));
	const outcome = await whatIf(locals.db, product, asked.data);
	if (outcome.status === 'answered') return json(outcome.answer);
	const { parameter, message } = outcome;
	return parameter === 'product' ? problem(409, message) : problem(400, message, { parameter });
};
