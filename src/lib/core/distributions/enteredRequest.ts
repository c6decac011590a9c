import { z } from 'zod';
import { condition } from '../characteristics/condition';
import { transform } from './summary';

const words = z.string().trim().min(1).max(500);

/**
 * What a person or script sends to enter a distribution of which only the summary exists. The
 * condition stands beside the numbers, in the units of `Condition`.
 */
export const enteredRequest = condition
	.extend({
		/** Key of the characteristic: `C_tot`. */
		characteristic: z.string(),
		/** Devices. */
		n: z.number().int().min(2),
		/** Of transformed SI values: ln of farad for a capacitance. */
		mean: z.number(),
		/** Of transformed values, divided by n − 1. */
		standardDeviation: z.number().nonnegative(),
		/** Default: that of the characteristic. */
		transform: transform.optional(),
		/** Why a summary has to do. */
		reason: words,
		/** Where it comes from. */
		source: words
	})
	.strict();
export type EnteredRequest = z.infer<typeof enteredRequest>;
