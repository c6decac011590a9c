import { json } from '@sveltejs/kit';
import { measurementMessages } from '$lib/core/messages/measurements';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findUpload } from '$lib/server/db/findUpload';
import { problem } from '$lib/server/problem';
import type { RequestHandler } from './$types';

/** An upload: its state, what was recognised of it, how it was mapped, and what stood in its way. */
export const GET: RequestHandler = async ({ locals, params }) => {
	requirePermission(locals, 'measurement.read');
	const id = Number(params.upload);
	const found = await findUpload(locals.db, id);
	if (found === undefined) return problem(404, measurementMessages.uploadNotFound(id));
	return json({
		id: found.id,
		partNumber: found.partNumber,
		fileName: found.fileName,
		sha256: found.sha256,
		byteSize: found.byteSize,
		state: found.state,
		uploadedAt: found.uploadedAt,
		uploadedBy: found.uploadedByName,
		preview: found.preview,
		mapping: found.confirmed?.mapping ?? null,
		setup: found.confirmed?.setup ?? null,
		problems: found.problems,
		measurementSet: found.set
	});
};
