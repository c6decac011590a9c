import { z } from 'zod';

/** How the values were transformed before they were summed up. */
export const transform = z.enum(['identity', 'ln', 'log10']);
export type Transform = z.infer<typeof transform>;

/** The sums of one lot and wafer, of transformed values. */
export const group = z.object({
	lot: z.string(),
	/** The independent lot it belongs to. */
	waferLot: z.string(),
	wafer: z.string(),
	sampleSize: z.number().int().positive(),
	mean: z.number(),
	/** Σ (y − mean)², about the group's own mean. */
	sumOfSquares: z.number().nonnegative(),
	/** Smallest and largest, back in SI units. */
	lowest: z.number(),
	highest: z.number()
});
export type Group = z.infer<typeof group>;

/**
 * The stored summary of a characteristic at a condition. `mean`, `standardDeviation` and the groups
 * speak of the transformed values (ln of farad for a capacitance), the quantiles of values in SI.
 */
export const distributionSummary = z.object({
	characteristic: z.string(),
	conditionKey: z.string(),
	unit: z.string(),
	transform,
	sampleSize: z.number().int().positive(),
	independentLots: z.number().int().positive(),
	wafers: z.number().int().positive(),
	mean: z.number(),
	/** Total, divided by n − 1; 0 for a single device. */
	standardDeviation: z.number().nonnegative(),
	skewness: z.number(),
	/** Type 8 (Hyndman and Fan), pairs of probability and value in SI units. */
	quantiles: z.array(z.object({ probability: z.number(), value: z.number() })),
	/** Whether the bias itself was measured, or interpolated within each sweep. */
	interpolated: z.boolean(),
	/** The measurement sets behind it. */
	sets: z.array(z.number().int()),
	/** The largest uncertainty those sets state, relative; `null` when none states one. */
	uncertainty: z.number().nonnegative().nullable(),
	/** Sweeps left out by a verdict. */
	excluded: z.number().int().nonnegative(),
	/** Sweeps left out because a suspect still waits for its verdict. */
	quarantined: z.number().int().nonnegative()
});
export type DistributionSummary = z.infer<typeof distributionSummary>;

/** A summary with its groups: all that `normal`, `lots` and `sigma` limits need. */
export interface Distribution extends DistributionSummary {
	readonly groups: readonly Group[];
}
