import { z } from 'zod';

/** How the values were transformed before they were summed up. */
export const transform = z.enum(['identity', 'ln', 'log10']);
export type Transform = z.infer<typeof transform>;

/** The sums of one lot and wafer, of transformed values that were observed, not censored. */
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

const meanSquare = z.object({
	sumOfSquares: z.number().nonnegative(),
	degrees: z.number().int().positive(),
	meanSquare: z.number().nonnegative()
});

/** As estimated, which may be negative, and as shown, which is then 0 and said to be so. */
const component = z.object({
	estimate: z.number(),
	variance: z.number().nonnegative(),
	isNegative: z.boolean()
});

/**
 * Variance components of the transformed values, with the mean squares they rest on. `wafer` and
 * `betweenWafers` are `null` where wafers are no level of their own: no lot has two of them.
 */
export const distributionComponents = z.object({
	lot: component,
	wafer: component.nullable(),
	device: component,
	/** Sum of the components as shown. */
	total: z.number().nonnegative(),
	betweenLots: meanSquare,
	betweenWafers: meanSquare.nullable(),
	within: meanSquare,
	/** E(MS lots) = σ_E² + k₂σ_W² + k₃σ_L², E(MS wafers) = σ_E² + k₁σ_W²; one-way only k₃. */
	coefficients: z.object({
		k1: z.number().nullable(),
		k2: z.number().nullable(),
		k3: z.number()
	})
});
export type DistributionComponents = z.infer<typeof distributionComponents>;

/**
 * Devices whose reading only says "at or below the floor" or "at or above the ceiling"; bounds in
 * SI, `null` where no device is censored on that side. All devices beyond a bound count as censored.
 */
export const censoring = z.object({
	atOrBelow: z.number().int().nonnegative(),
	floor: z.number().nullable(),
	atOrAbove: z.number().int().nonnegative(),
	ceiling: z.number().nullable()
});
export type Censoring = z.infer<typeof censoring>;

/**
 * The stored summary of a characteristic at a condition. `mean`, `standardDeviation` and the groups
 * speak of the transformed values (ln of farad for a capacitance), the quantiles of values in SI.
 *
 * With censored devices, mean, deviation, skewness and groups are those of the *observed* devices,
 * which alone are no estimate of the population: `censoredSums` gives what a likelihood needs.
 */
export const distributionSummary = z.object({
	characteristic: z.string(),
	conditionKey: z.string(),
	unit: z.string(),
	transform,
	/** Devices, censored ones included. */
	sampleSize: z.number().int().positive(),
	/** 0 where nobody knows: an entered distribution doesn't tell. */
	independentLots: z.number().int().nonnegative(),
	wafers: z.number().int().nonnegative(),
	mean: z.number(),
	/** Total, divided by n − 1; 0 for a single device. */
	standardDeviation: z.number().nonnegative(),
	skewness: z.number(),
	/**
	 * Type 8 (Hyndman and Fan), pairs of probability and value in SI units. A censored device stands
	 * at its bound; where a quantile rests on one, it lies at most or at least there.
	 */
	quantiles: z.array(
		z.object({
			probability: z.number(),
			value: z.number(),
			bound: z.enum(['atMost', 'atLeast']).optional()
		})
	),
	/** Whether the bias itself was measured, or interpolated within each sweep. */
	interpolated: z.boolean(),
	/** V_j in V: interpolated linearly in ln C against ln(V_R + V_j). Absent where measured. */
	junctionPotential: z.number().positive().optional(),
	/** The measurement sets behind it. */
	sets: z.array(z.number().int()),
	/** The largest uncertainty those sets state, relative; `null` when none states one. */
	uncertainty: z.number().nonnegative().nullable(),
	/** Sweeps left out by a verdict. */
	excluded: z.number().int().nonnegative(),
	/** Sweeps left out because a suspect still waits for its verdict. */
	quarantined: z.number().int().nonnegative(),
	/** Computed from devices, or entered from a summary somebody had: not recomputable. */
	origin: z.enum(['measured', 'entered']).default('measured'),
	/** Absent when no device is censored. */
	censoring: censoring.optional(),
	/**
	 * Anderson–Darling on residuals within lots, the statistic adjusted for n; `null` for fewer than
	 * eight residuals, without spread, and with censored devices.
	 */
	normality: z
		.object({ statistic: z.number(), pValue: z.number().min(0).max(1) })
		.nullable()
		.default(null),
	/** `null` for one lot, without two devices of a lot that differ, and with censored devices. */
	components: distributionComponents.nullable().default(null)
});
export type DistributionSummary = z.infer<typeof distributionSummary>;

/**
 * The outermost devices in SI units: `lowest` upwards from the smallest, `highest` downwards from
 * the largest. Small samples are in both wholly; both are empty where only a summary exists.
 */
export interface Extremes {
	readonly lowest: readonly number[];
	readonly highest: readonly number[];
}

/** A summary with its groups and extremes: all that limits for a single condition need. */
export interface Distribution extends DistributionSummary {
	readonly groups: readonly Group[];
	readonly extremes: Extremes;
}
