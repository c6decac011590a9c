import { signInFirst } from '$lib/core/messages';
import { fileNotFound, releaseNotFound, releaseWithdrawn } from '$lib/core/messages/publish';
import { findRelease } from '$lib/server/db/findRelease';
import { problem } from '$lib/server/problem';
import { mayReadLibrary, type LibraryAccess } from '$lib/server/services/mayReadLibrary';
import { readReleaseFile } from '$lib/server/services/readReleaseFile';
import { isReleaseFileName } from '$lib/server/services/releaseFiles';
import type { RequestHandler } from './$types';

/**
 * A file of a release. Its bytes never change, so a public one may be kept for good; one that needs
 * a sign-in is asked about again each time.
 */
export const GET: RequestHandler = async ({ locals, params, request }) => {
	const access = await mayReadLibrary(locals.db, locals.person);
	if (!access.isAllowed) return problem(401, signInFirst());
	const { partNumber, version, file: name } = params;
	const release = await findRelease(locals.db, partNumber, version);
	if (release === undefined) return problem(404, releaseNotFound(partNumber, version));
	if (release.state === 'withdrawn' && !access.isReader)
		return problem(410, releaseWithdrawn(partNumber, version));
	if (!isReleaseFileName(name)) return problem(404, fileNotFound(name));

	const file = await readReleaseFile(locals, release, name);
	if (file.status === 'absent') return problem(404, fileNotFound(name));
	if (file.status === 'damaged') {
		locals.log.error({ partNumber, version, name }, 'a published file is damaged');
		return problem(500, file.message);
	}
	if (file.wasHealed) locals.log.warn({ partNumber, version, name }, 'a published file was healed');

	const headers = {
		etag: `"${file.sha256}"`,
		'cache-control': caching(access, release.state === 'withdrawn'),
		'x-content-type-options': 'nosniff'
	};
	if (matches(request.headers.get('if-none-match'), headers.etag))
		return new Response(null, { status: 304, headers });
	return new Response(Buffer.from(file.bytes), {
		headers: {
			...headers,
			'content-type': file.mediaType,
			'content-length': String(file.bytes.byteLength),
			'content-disposition': `inline; filename="${partNumber}-${version}-${name}"`
		}
	});
};

function caching({ isPublic }: LibraryAccess, isWithdrawn: boolean): string {
	return isPublic && !isWithdrawn ? 'public, max-age=31536000, immutable' : 'private, no-cache';
}

/** RFC 9110, 13.1.2: any of the listed tags, compared weakly, or `*`. */
function matches(ifNoneMatch: string | null, etag: string): boolean {
	if (ifNoneMatch === null) return false;
	return ifNoneMatch
		.split(',')
		.map((tag) => tag.trim().replace(/^W\//, ''))
		.some((tag) => tag === '*' || tag === etag);
}
