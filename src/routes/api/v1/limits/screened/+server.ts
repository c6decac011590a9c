import { json } from '@sveltejs/kit';
import { screenedLimits } from '$lib/core/limits/screened/screenedLimits';
import { screenedRequest } from '$lib/core/limits/screened/screenedRequest';
import { screenedMessages } from '$lib/core/messages/screened';
import { firstProblem, schemaProblems, type RequestProblem } from '$lib/core/requestProblems';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { problem } from '$lib/server/problem';
import type { RequestHandler } from './$types';

const refused = (errors: readonly RequestProblem[]) =>
	problem(422, firstProblem(errors), { errors });

/** Limits at one condition from a test at another; nothing is stored. */
export const POST: RequestHandler = async ({ locals, request }) => {
	requirePermission(locals, 'limit.read');
	const body: unknown = await request.json().catch(() => undefined);
	if (body === undefined) return problem(400, screenedMessages.notJson());
	const asked = screenedRequest.safeParse(body);
	if (!asked.success) return refused(schemaProblems(asked.error));

	const outcome = screenedLimits(asked.data);
	return outcome.status === 'answered' ? json(outcome.answer) : refused(outcome.problems);
};
