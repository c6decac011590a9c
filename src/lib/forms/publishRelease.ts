import { z } from 'zod';

/** How an approved revision becomes a release. */
export const publishReleaseForm = z.object({
	/** First day in force, UTC. */
	effectiveFrom: z.iso.date('Choose a date.'),
	/** The version as it was shown. */
	version: z.string().regex(/^\d+\.\d+$/),
	/** The line of the revision history. */
	summary: z.string().trim().min(1, 'Say in a line what changed.').max(300)
});
