import { findPendingMigrations } from '$lib/server/db/findPendingMigrations';
import type { RequestHandler } from './$types';

/** The database answers with its tables as this build knows them, and files can be written. */
export const GET: RequestHandler = async ({ locals }) => {
	const isReady = await Promise.all([
		findPendingMigrations(locals.db).then((pending) => pending === 0),
		locals.storage.isWritable()
	]).then(
		(answers) => !answers.includes(false),
		() => false
	);
	return new Response(isReady ? 'ready' : 'not ready', {
		status: isReady ? 200 : 503,
		headers: { 'content-type': 'text/plain', 'cache-control': 'no-store' }
	});
};
