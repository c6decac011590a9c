import { requirePermission } from '$lib/server/auth/requirePermission';
import { problem } from '$lib/server/problem';
import { drawProof } from '$lib/server/services/drawProof';
import type { RequestHandler } from './$types';

const WAIT_MILLISECONDS = 20_000;

/** The proof as the PDF that will be printed, marked DRAFT. Drawn by the worker, cached by content. */
export const GET: RequestHandler = async ({ locals, params, request }) => {
	const person = requirePermission(locals, 'draft.read');
	const outcome = await drawProof(locals, {
		partNumber: params.partNumber,
		by: person.id,
		waitMilliseconds: WAIT_MILLISECONDS
	});
	if (outcome.status === 'refused') return problem(409, outcome.message);
	if (outcome.status === 'late')
		return problem(503, 'The proof is still being drawn. Ask again in a moment.', {
			job: outcome.job
		});

	const etag = `"${outcome.sha256}"`;
	const headers = { etag, 'cache-control': 'private, no-cache' };
	if (request.headers.get('if-none-match') === etag)
		return new Response(null, { status: 304, headers });
	const bytes = await locals.storage.read(outcome.key);
	return new Response(new Uint8Array(bytes), {
		headers: {
			...headers,
			'content-type': 'application/pdf',
			'content-disposition': `inline; filename="${fileName(params.partNumber)}"`
		}
	});
};

function fileName(partNumber: string): string {
	return `${partNumber.replaceAll(/[^A-Za-z0-9._-]/g, '_')}-draft.pdf`;
}
