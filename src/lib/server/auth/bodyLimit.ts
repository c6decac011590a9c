const SMALL = 1_000_000;
/** A form with a file is held in memory, so it takes small files only. */
export const FORM_FILE_LIMIT = 16_000_000;

/**
 * How many bytes a request to this path may bring. The adapter's own limit is lifted for the
 * uploads that are streamed to disk and counted there, so the others are held here.
 */
export function bodyLimit(path: string): number {
	if (/^\/api\/v1\/products\/[^/]+\/measurement-sets$/.test(path)) return Infinity;
	return /^\/products\/[^/]+\/measurements$/.test(path) ? FORM_FILE_LIMIT + SMALL : SMALL;
}
