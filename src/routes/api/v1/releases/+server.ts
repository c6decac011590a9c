import { versionText } from '$lib/core/datasheet/record';
import { signInFirst } from '$lib/core/messages';
import { listPublished } from '$lib/server/db/listPublished';
import { problem } from '$lib/server/problem';
import { mayReadLibrary } from '$lib/server/services/mayReadLibrary';
import type { RequestHandler } from './$types';

/** Every release: `sha256` is that of its PDF. */
export const GET: RequestHandler = async ({ locals }) => {
	const access = await mayReadLibrary(locals.db, locals.person);
	if (!access.isAllowed) return problem(401, signInFirst());
	const today = new Date().toISOString().slice(0, 10);
	const releases = await listPublished(locals.db, today);
	return Response.json(
		{
			releases: releases.map(({ partNumber, major, minor, state, effectiveFrom, sha256 }) => ({
				partNumber,
				version: versionText({ major, minor }),
				status: state,
				effectiveFrom,
				sha256
			}))
		},
		{ headers: { 'cache-control': 'no-cache' } }
	);
};
