import { chiSquareQuantile } from './chiSquare';
import { OutsideDomainError } from './errors';
import { logChiSquareRule } from './logChiSquareRule';
import type { LotStrata, Stratum } from './lotStrata';

/** Bounds of the spacing of a quadrature within lots, in deviations of the variance. */
const WIDEST_STEP = 0.9;
const FINEST_STEP = 0.06;

/** Products of weights below this are left out of a sum. */
export const NEGLIGIBLE = 1e-10;

/** A discrete stand-in for the distribution of a variance: values and their probabilities. */
export interface VarianceSpread {
	readonly values: Float64Array;
	readonly weights: Float64Array;
}

/** A variance that is 0 for sure. */
const NOTHING: VarianceSpread = { values: Float64Array.of(0), weights: Float64Array.of(1) };

/** Generalized variance of one stratum: share · SS/U over the distribution of U. */
export function spreadOf({ variance, degrees, share }: Stratum, step: number): VarianceSpread {
	if (share * variance === 0) return NOTHING;
	const { nodes, weights } = logChiSquareRule(degrees, step);
	return { values: nodes.map((u) => (share * variance * degrees) / u), weights };
}

/** Distribution of the sum of two independent variances. */
export function sumOfTwo(first: VarianceSpread, second: VarianceSpread): VarianceSpread {
	const size = first.values.length * second.values.length;
	const values = new Float64Array(size);
	const weights = new Float64Array(size);
	let count = 0;
	for (let i = 0; i < first.values.length; i++)
		for (let j = 0; j < second.values.length; j++) {
			const weight = first.weights[i]! * second.weights[j]!;
			if (weight < NEGLIGIBLE) continue;
			values[count] = first.values[i]! + second.values[j]!;
			weights[count] = weight;
			count++;
		}
	return { values: values.subarray(0, count), weights: weights.subarray(0, count) };
}

/** Standard deviation of the generalized variance of a stratum, to first order. */
export const deviationOf = ({ variance, degrees, share }: Stratum) =>
	Math.sqrt(2 / degrees) * share * variance;

/** How smooth the stratum left out makes the integrand over the others. */
export interface Smoothing {
	/** About the middle, in units of variance. */
	readonly central: number;
	/** Where the limit is decided, far out: relative to the variance there. */
	readonly inTail: number;
}

/** A stratum with fewer degrees reaches into the tail where the limit is decided. */
const REACHES_TAIL = 30;

/** So many deviations of a smoothing may lie between nodes; the rule's error is then below 1e-5. */
const TAIL_STEP = 1.3;

/**
 * The generalized variances of several strata together. What the stratum left out does to a limit
 * smooths the integrand over these; the less it does, the finer they must be taken.
 *
 * @param widening - of every step, for a first look
 */
export function sumOfSpreads(
	strata: readonly Stratum[],
	smoothing: Smoothing,
	widening: number
): VarianceSpread {
	let smooth = smoothing.central;
	const spreads = strata.map((stratum) => {
		const { degrees } = stratum;
		const deviation = deviationOf(stratum);
		const widest = degrees > 30 ? WIDEST_STEP : WIDEST_STEP / 2;
		const central = deviation > 0 ? smooth / deviation : widest;
		const ofLogarithm = Math.sqrt(2 / degrees + 1 / (degrees * degrees));
		const inTail = degrees > REACHES_TAIL ? widest : (TAIL_STEP * smoothing.inTail) / ofLogarithm;
		smooth = Math.hypot(smooth, deviation);
		const step = Math.min(widest, central, inTail);
		return spreadOf(stratum, widening * Math.max(FINEST_STEP, step));
	});
	return spreads.reduce(sumOfTwo, NOTHING);
}

/** How large the whole variance may be: every stratum at its upper twentieth. */
export function tailVariance(strata: readonly Stratum[]): number {
	return strata.reduce(
		(sum, { variance, degrees, share }) =>
			sum + (share * variance * degrees) / chiSquareQuantile(TWENTIETH, degrees),
		0
	);
}

const TWENTIETH = 0.05;

/** Half the finest step within lots, in units of variance: below it a smoothing can't be followed. */
export function leastSmoothing(within: readonly Stratum[]): number {
	return (FINEST_STEP / 2) * Math.hypot(...within.map(deviationOf));
}

/**
 * The lots, and all below them.
 *
 * @throws {OutsideDomainError} for a design without devices below the lots
 */
export function splitStrata(strata: LotStrata): readonly [Stratum, readonly Stratum[]] {
	const [lots, ...within] = strata.strata;
	if (!lots || within.length === 0)
		throw new OutsideDomainError('lots tolerance limit', 'at least 2 strata', strata.strata.length);
	return [lots, within];
}

/** Variance of a single device of a future lot, as estimated. */
export function totalVariance({ strata }: LotStrata): number {
	return strata.reduce((sum, { variance, share }) => sum + variance * share, 0);
}
