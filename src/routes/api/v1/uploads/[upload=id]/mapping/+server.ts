import { json } from '@sveltejs/kit';
import { requestedMapping } from '$lib/core/measurements/requestedMapping';
import { measurementMessages } from '$lib/core/messages/measurements';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { problem } from '$lib/server/problem';
import { mapUpload } from '$lib/server/services/mapUpload';
import type { RequestHandler } from './$types';

const STATUS = { notFound: 404, notNow: 409, incomplete: 422 } as const;

/** Says what the columns mean and queues the import. `{}` takes everything as it was recognised. */
export const POST: RequestHandler = async ({ locals, params, request }) => {
	const person = requirePermission(locals, 'measurement.upload');
	const body: unknown = await request.json().catch(() => undefined);
	const said = requestedMapping.safeParse(body);
	if (!said.success) {
		return problem(400, measurementMessages.notAMapping(), {
			errors: said.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }))
		});
	}

	const outcome = await mapUpload(locals, {
		upload: Number(params.upload),
		request: said.data,
		by: person.id
	});
	if (outcome.status === 'refused') {
		return problem(STATUS[outcome.why], outcome.message, { messages: outcome.messages });
	}
	return json(
		{
			upload: { id: outcome.upload, url: `/api/v1/uploads/${outcome.upload}` },
			job: { id: outcome.job, url: `/api/v1/jobs/${outcome.job}` }
		},
		{ status: 202 }
	);
};
