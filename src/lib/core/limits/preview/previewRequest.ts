import { z } from 'zod';
import { transform } from '../../distributions/summary';
import { allowance } from '../allowance';
import { drift, limitMethod, resolution } from '../policy';

/** As many values as a script may send at once. */
const MOST_VALUES = 200_000;

const value = z.number();
const sample = z.array(value).min(1).max(MOST_VALUES);
const lots = z.array(sample).min(1).max(1000);
const lotsOfWafers = z.array(lots).min(1).max(1000);

/** Moments of transformed values, where only a summary exists. */
export const enteredMoments = z.object({
	n: z.number().int().min(2).max(1e9),
	mean: z.number(),
	standardDeviation: z.number().nonnegative()
});

export const previewPolicy = z.object({
	method: limitMethod,
	content: z.number().gt(0).lt(1),
	confidence: z.number().gt(0).lt(1),
	sides: z.enum(['minimum', 'maximum', 'minimum-and-maximum']).default('minimum-and-maximum'),
	tails: z.enum(['each', 'both']).default('each'),
	k: z.number().positive().optional(),
	/** A number is a step in the unit of the values. */
	resolution: z.union([z.number().positive(), resolution]).optional(),
	/** A number is a share of the value. */
	drift: drift.optional(),
	/** Systematic uncertainty U; a number is an amount in the unit of the values. */
	uncertainty: z.union([z.number().min(0), allowance]).optional(),
	/** r of the guard band r·U; with it, test limits are answered. */
	guardBand: z.number().min(0).max(10).optional()
});

/** What a script asks: values in any unit, as they lie or by lots, or a summary; and a policy. */
export const previewRequest = z
	.object({
		values: sample.optional(),
		/** One array a lot. */
		groups: lots.optional(),
		/** One array a lot of one array a wafer. */
		nestedGroups: lotsOfWafers.optional(),
		distribution: enteredMoments.optional(),
		transform: transform.default('identity'),
		policy: previewPolicy
	})
	.refine(
		({ values, groups, nestedGroups, distribution }) =>
			[values, groups, nestedGroups, distribution].filter((of) => of !== undefined).length === 1,
		{ message: 'give exactly one of values, groups, nestedGroups and distribution' }
	);
export type PreviewRequest = z.infer<typeof previewRequest>;
