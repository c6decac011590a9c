import { OutsideDomainError, SampleTooSmallError } from './errors';
import { findRoot } from './findRoot';
import { noncentralTLowerTail } from './noncentralT';
import { normalQuantile } from './normalQuantile';
import { requireProbability } from './requireProbability';

/** Mean and overall deviation of a sample, in the transformed values limits are made in. */
export interface SampleMoments {
	readonly sampleSize: number;
	readonly mean: number;
	readonly standardDeviation: number;
}

/** One limit or both. */
export interface SpecificationLimits {
	readonly minimum?: number;
	readonly maximum?: number;
}

/**
 * Ppk: the distance of the mean from the nearer limit in units of three overall deviations.
 *
 * Source: AIAG SPC manual, from memory.
 *
 * @throws {OutsideDomainError} without a limit, or without spread
 */
export function performanceIndex(
	{ mean, standardDeviation }: SampleMoments,
	{ minimum, maximum }: SpecificationLimits
): number {
	if (!(standardDeviation > 0))
		throw new OutsideDomainError('performanceIndex', 'a spread', standardDeviation);
	if (minimum === undefined && maximum === undefined)
		throw new OutsideDomainError('performanceIndex', 'at least 1 limit', 0);
	const below = minimum === undefined ? Infinity : mean - minimum;
	const above = maximum === undefined ? Infinity : maximum - mean;
	return Math.min(below, above) / (3 * standardDeviation);
}

/**
 * Lower confidence bound of Ppk with two limits: index·(1 − z_γ √(1/(9n·index²) + 1/(2(n−1)))).
 *
 * Source: Bissell 1990, Applied Statistics 39.
 *
 * @throws {SampleTooSmallError} for fewer than two devices
 * @throws {OutsideDomainError} unless the index is positive
 */
export function performanceIndexLowerBound(
	index: number,
	{ sampleSize, confidence }: { readonly sampleSize: number; readonly confidence: number }
): number {
	requireProbability('performanceIndexLowerBound', 'a confidence', confidence);
	if (sampleSize < 2) throw new SampleTooSmallError('performanceIndexLowerBound', 2, sampleSize);
	if (!(index > 0))
		throw new OutsideDomainError('performanceIndexLowerBound', 'a positive index', index);
	const error = 1 / (9 * sampleSize * index * index) + 1 / (2 * (sampleSize - 1));
	return index * (1 - normalQuantile(confidence) * Math.sqrt(error));
}

/**
 * Exact lower confidence bound of an index with a single limit, by the noncentral t distribution.
 *
 * Source: Kushler and Hurley 1992, Journal of Quality Technology 24.
 *
 * @throws {SampleTooSmallError} for fewer than two devices
 */
export function oneSidedIndexLowerBound(
	index: number,
	{ sampleSize, confidence }: { readonly sampleSize: number; readonly confidence: number }
): number {
	requireProbability('oneSidedIndexLowerBound', 'a confidence', confidence);
	if (sampleSize < 2) throw new SampleTooSmallError('oneSidedIndexLowerBound', 2, sampleSize);
	const scale = 3 * Math.sqrt(sampleSize);
	const excess = (bound: number) =>
		noncentralTLowerTail(index * scale, sampleSize - 1, bound * scale) - confidence;
	let lower = index;
	for (let step = 0.1; excess(lower) < 0; step *= 2) lower -= step;
	let upper = lower;
	for (let step = 0.1; excess(upper) > 0; step *= 2) upper += step;
	return findRoot(excess, lower, upper, 1e-12);
}
