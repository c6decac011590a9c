import { z } from 'zod';

/**
 * One difference between two datasheets, as a customer would weigh it. `loosened` is a wider value,
 * a different condition (the promise at the old one is gone), a weaker basis or weaker terms.
 */
export const change = z.object({
	kind: z.enum(['tightened', 'loosened', 'moved', 'added', 'removed', 'rating', 'text']),
	/** What it touches; decides between a major and a minor version. */
	area: z.enum(['guarantee', 'condition', 'basis', 'rating', 'typical', 'ordering', 'text']),
	/** Id of the row or text it is about. */
	row: z.string(),
	/** The row in words: `C_tot at V_R = 4 V`. */
	label: z.string(),
	/** Which part of the row: `minimum`, `typical`, `conditions` … */
	part: z.string(),
	before: z.string().nullable(),
	after: z.string().nullable(),
	/** (after − before) / |before| of a number; `null` otherwise. */
	relative: z.number().nullable()
});
export type Change = z.infer<typeof change>;
export type ChangeKind = Change['kind'];

/** The kinds in the order a reader cares for them. */
export const CHANGE_KINDS = [
	'loosened',
	'removed',
	'rating',
	'tightened',
	'added',
	'moved',
	'text'
] as const satisfies readonly ChangeKind[];
