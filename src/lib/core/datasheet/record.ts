import { z } from 'zod';
import { change } from './change';

const version = z.object({
	major: z.number().int().nonnegative(),
	minor: z.number().int().nonnegative()
});

/**
 * What publishing adds to a document. A draft's proof has one as well, so that the renderer is one
 * function of document and record.
 */
export const publicationRecord = z.object({
	kind: z.enum(['draft', 'review', 'release']),
	version: version.nullable(),
	/** Effective date of a release, date of the proof otherwise: ISO date. */
	date: z.iso.date(),
	/** The instant of the proof or of publishing, ISO 8601 in UTC: becomes the PDF's own dates. */
	at: z.iso.datetime(),
	/** SHA-256 of the document's canonical bytes, hex. */
	contentHash: z.string().regex(/^[0-9a-f]{64}$/),
	previous: z.object({ version, date: z.iso.date() }).nullable(),
	/** Newest first. */
	history: z.array(
		z.object({
			version,
			date: z.iso.date(),
			/** In a person's words. */
			changes: z.string(),
			/** The differences one by one, weightiest first; older records haven't got them. */
			list: z.array(change.pick({ kind: true, label: true, before: true, after: true })).optional()
		})
	),
	/** Ids of the rows that differ from the previous release: they get a change bar. */
	changedRows: z.array(z.string())
});
export type PublicationRecord = z.infer<typeof publicationRecord>;

/** `2.0`, as it is printed and as it stands in an address. */
export function versionText(of: { readonly major: number; readonly minor: number }): string {
	return `${of.major}.${of.minor}`;
}
