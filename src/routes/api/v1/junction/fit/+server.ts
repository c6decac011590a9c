import { json } from '@sveltejs/kit';
import { analyseSweep } from '$lib/core/junction/analyseSweep';
import { sweepRequest } from '$lib/core/junction/sweepRequest';
import { junctionMessages } from '$lib/core/messages/junction';
import { firstProblem, schemaProblems, type RequestProblem } from '$lib/core/requestProblems';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { problem } from '$lib/server/problem';
import type { RequestHandler } from './$types';

const refused = (errors: readonly RequestProblem[]) =>
	problem(422, firstProblem(errors), { errors });

/** What one C–V sweep says of its junction; nothing is stored. */
export const POST: RequestHandler = async ({ locals, request }) => {
	requirePermission(locals, 'limit.read');
	const body: unknown = await request.json().catch(() => undefined);
	if (body === undefined) return problem(400, junctionMessages.notASweep());
	const asked = sweepRequest.safeParse(body);
	if (!asked.success) return refused(schemaProblems(asked.error));

	const outcome = analyseSweep(asked.data);
	return outcome.status === 'analysed' ? json(outcome.analysis) : refused(outcome.problems);
};
