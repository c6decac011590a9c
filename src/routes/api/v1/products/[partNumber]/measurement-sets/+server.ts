import { json } from '@sveltejs/kit';
import { measurementMessages } from '$lib/core/messages/measurements';
import { productNotFound } from '$lib/core/messages/review';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { listMeasurementSets } from '$lib/server/db/listMeasurementSets';
import { problem } from '$lib/server/problem';
import { receiveUpload } from '$lib/server/services/receiveUpload';
import type { RequestHandler } from './$types';
import { bodyPieces } from './bodyPieces';

const STATUS = { noProduct: 404, noName: 400, empty: 400, tooLarge: 413, duplicate: 409 } as const;

/** The accepted measurement sets of a product, newest first. */
export const GET: RequestHandler = async ({ locals, params }) => {
	requirePermission(locals, 'measurement.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) return problem(404, productNotFound(params.partNumber));
	const sets = await listMeasurementSets(locals.db, product.id);
	return json({
		measurementSets: sets.map(({ id, fileName, setup, counts, acceptedAt, acceptedByName }) => ({
			id,
			fileName,
			setup,
			counts,
			acceptedAt,
			acceptedBy: acceptedByName
		}))
	});
};

/** Takes the raw body as a file and answers at once; the first look at it is a job. */
export const POST: RequestHandler = async ({ locals, params, request, url }) => {
	const person = requirePermission(locals, 'measurement.upload');
	// The framework gives no body when the request doesn't say what it is.
	if (request.body === null) return problem(400, measurementMessages.noBody());

	const outcome = await receiveUpload(locals, {
		partNumber: params.partNumber,
		fileName: url.searchParams.get('filename') ?? '',
		body: bodyPieces(request.body),
		by: person.id,
		limit: locals.uploadLimit
	});
	if (outcome.status === 'refused') {
		const earlier =
			outcome.why === 'duplicate' ? { upload: uploadReference(outcome.earlier.upload) } : {};
		return problem(STATUS[outcome.why], outcome.message, earlier);
	}
	return json(
		{
			upload: uploadReference(outcome.upload),
			job: { id: outcome.job, url: `/api/v1/jobs/${outcome.job}` }
		},
		{ status: 202, headers: { location: `/api/v1/uploads/${outcome.upload}` } }
	);
};

function uploadReference(id: number) {
	return { id, url: `/api/v1/uploads/${id}` };
}
