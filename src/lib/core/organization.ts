import { z } from 'zod';

/** What the organization decided about itself; stored in immutable versions. */
export const organization = z.object({
	name: z.string().trim().min(1).max(80),
	/** Paper of the printed datasheets. */
	paper: z.enum(['a4', 'letter']),
	/** Language tag of the datasheets. */
	language: z.string().min(2),
	/** Whether published datasheets are there for everyone, without signing in. */
	libraryIsPublic: z.boolean(),
	/** Legal notice at the end of each datasheet, one entry a paragraph. */
	notice: z.array(z.string().min(1))
});
export type Organization = z.infer<typeof organization>;

/**
 * What holds until an administrator says otherwise. The cautions are ours: limits rest on measured
 * lots, and use where failure can hurt someone needs an agreement.
 */
export const DEFAULT_ORGANIZATION: Organization = {
	name: 'Your organization',
	paper: 'a4',
	language: 'en',
	libraryIsPublic: false,
	notice: [
		'Ratings are limiting values in the sense of IEC 60134. Typical values are not guaranteed.',
		'Characterized limits rest on the lots measured and do not replace production test.',
		'Use where a failure can hurt someone needs the written agreement of the maker, the standards and codes that apply there, and licensed practice.'
	]
};
