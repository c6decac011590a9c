import { STATUS_CODES } from 'node:http';

/**
 * A refusal as RFC 9457 problem details.
 *
 * @param extra further members that a script can use, as `requiredSampleSize`
 */
export function problem(
	status: number,
	detail: string,
	extra: Readonly<Record<string, unknown>> = {}
): Response {
	const title = STATUS_CODES[status] ?? 'Problem';
	return new Response(JSON.stringify({ type: 'about:blank', title, status, detail, ...extra }), {
		status,
		headers: { 'content-type': 'application/problem+json', 'cache-control': 'no-store' }
	});
}
