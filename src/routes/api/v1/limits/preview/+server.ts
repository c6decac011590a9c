import { json } from '@sveltejs/kit';
import { previewLimits } from '$lib/core/limits/preview/previewLimits';
import { previewRequest } from '$lib/core/limits/preview/previewRequest';
import { limitMessages } from '$lib/core/messages/limits';
import { firstProblem, schemaProblems } from '$lib/core/requestProblems';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { problem } from '$lib/server/problem';
import type { RequestHandler } from './$types';

/** Limits of values that a script sends along; nothing is stored. */
export const POST: RequestHandler = async ({ locals, request }) => {
	requirePermission(locals, 'limit.read');
	const body: unknown = await request.json().catch(() => undefined);
	if (body === undefined) return problem(400, limitMessages.notJson());
	const asked = previewRequest.safeParse(body);
	if (!asked.success) {
		const errors = schemaProblems(asked.error);
		return problem(422, firstProblem(errors), { errors });
	}
	const preview = previewLimits(asked.data);
	if (preview.status === 'answered') return json(preview.answer);
	const { message, requiredSampleSize } = preview;
	return problem(422, message, requiredSampleSize === undefined ? {} : { requiredSampleSize });
};
