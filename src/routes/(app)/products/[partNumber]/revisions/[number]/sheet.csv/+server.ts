import { revisionNotFound } from '$lib/core/messages/review';
import { sheetCsv } from '$lib/core/review/sheetCsv';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findRevision } from '$lib/server/db/findRevision';
import { listVerificationRows } from '$lib/server/db/listVerificationRows';
import { problem } from '$lib/server/problem';
import type { RequestHandler } from './$types';

export const GET: RequestHandler = async ({ locals, params }) => {
	requirePermission(locals, 'revision.read');
	const number = /^\d{1,9}$/.test(params.number) ? Number(params.number) : 0;
	const revision = await findRevision(locals.db, params.partNumber, number);
	if (revision === undefined) return problem(404, revisionNotFound(params.partNumber, number));
	const csv = sheetCsv(await listVerificationRows(locals.db, revision.id));
	return new Response(csv, {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'content-disposition': `attachment; filename="${params.partNumber}-revision-${number}.csv"`,
			'cache-control': 'private, no-store'
		}
	});
};
