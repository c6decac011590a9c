import { z } from 'zod';

/** What stands behind a printed limit, strongest first. */
export const BASES = [
	'tested',
	'sample-tested',
	'correlation',
	'characterized',
	'typical'
] as const;
export const basis = z.enum(BASES);
export type Basis = z.infer<typeof basis>;

/** The short mark of the printed sheet. */
export const BASIS_MARKS = {
	tested: 'T',
	'sample-tested': 'S',
	correlation: 'G',
	characterized: 'C',
	typical: 'typ'
} as const satisfies Record<Basis, string>;

/** The words, where there is room. */
export const BASIS_WORDS = {
	tested: 'tested on every device',
	'sample-tested': 'sample-tested',
	correlation: 'guaranteed by correlation',
	characterized: 'characterized',
	typical: 'typical, not guaranteed'
} as const satisfies Record<Basis, string>;
