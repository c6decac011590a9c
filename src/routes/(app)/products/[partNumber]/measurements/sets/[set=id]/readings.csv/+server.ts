import { error } from '@sveltejs/kit';
import { measurementMessages } from '$lib/core/messages/measurements';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findMeasurementSet } from '$lib/server/db/findMeasurementSet';
import { exportSet } from '$lib/server/services/exportSet';
import type { RequestHandler } from './$types';

/** The accepted readings, streamed: a set can have millions. */
export const GET: RequestHandler = async ({ locals, params }) => {
	requirePermission(locals, 'measurement.read');
	const id = Number(params.set);
	const set = await findMeasurementSet(locals.db, id);
	if (set === undefined || set.partNumber !== params.partNumber) {
		error(404, measurementMessages.setNotFound(id));
	}
	const pieces = exportSet(locals.db, id);
	const encoder = new TextEncoder();
	const stream = new ReadableStream<Uint8Array>({
		async pull(controller) {
			const next = await pieces.next();
			if (next.done === true) controller.close();
			else controller.enqueue(encoder.encode(next.value));
		},
		async cancel() {
			await pieces.return(undefined);
		}
	});
	return new Response(stream, {
		headers: {
			'content-type': 'text/csv; charset=utf-8',
			'cache-control': 'private, no-store',
			'content-disposition': `attachment; filename="${params.partNumber}-set-${id}.csv"`
		}
	});
};
