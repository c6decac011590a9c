import { groupBy } from '../groupBy';
import { NoSolutionError, OutsideDomainError, SampleTooSmallError } from './errors';
import { bracketIncreasing, findRoot } from './findRoot';
import { groupSums } from './groupSums';
import { logNormalLowerTail, normalHazard } from './logNormalTail';
import { normalQuantile } from './normalQuantile';
import { oneSidedToleranceFactor, type TolerancePromise } from './toleranceFactor';
import type { GroupSums } from './varianceComponents';

/** Readings of which some only say "at most" (left) or "at least" (right). */
export interface CensoredSample {
	readonly exact: readonly number[];
	readonly atMost: readonly number[];
	readonly atLeast: readonly number[];
}

/** So many readings that only say they lie on one side of a bound. */
export interface CensoredCount {
	readonly count: number;
	readonly bound: number;
}

/**
 * All that the likelihood of a censored sample depends on: sums of the readings that carry numbers,
 * and counts of the others. Enough where the readings themselves are no longer at hand.
 */
export interface CensoredSums {
	readonly observed: GroupSums;
	readonly atMost: readonly CensoredCount[];
	readonly atLeast: readonly CensoredCount[];
}

export interface CensoredFit {
	readonly mean: number;
	readonly standardDeviation: number;
	readonly logLikelihood: number;
}

const FEWEST_EXACT = 3;
const LOG_SQRT_TWO_PI = 0.9189385332046727;

function sumsOf({ exact, atMost, atLeast }: CensoredSample): CensoredSums {
	const [first] = exact;
	const sums = first === undefined ? { sampleSize: 0, mean: 0, sumOfSquares: 0 } : groupSums(exact);
	const isStill = exact.every((y) => y === first);
	return {
		observed: isStill ? { ...sums, sumOfSquares: 0 } : sums,
		atMost: countsOf(atMost),
		atLeast: countsOf(atLeast)
	};
}

const countsOf = (bounds: readonly number[]): CensoredCount[] =>
	[...groupBy(bounds, (bound) => bound)].map(([bound, all]) => ({ bound, count: all.length }));

/** The other way round: what was at most is at least. */
const mirrored = ({ observed, atMost, atLeast }: CensoredSums): CensoredSums => ({
	observed: { ...observed, mean: -observed.mean },
	atMost: atLeast.map(({ count, bound }) => ({ count, bound: -bound })),
	atLeast: atMost.map(({ count, bound }) => ({ count, bound: -bound }))
});

/** Sums in units in which the observed readings have mean 0 and Σ y² = n. */
interface Standardized {
	readonly count: number;
	readonly atMost: readonly CensoredCount[];
	readonly atLeast: readonly CensoredCount[];
	readonly centre: number;
	readonly scale: number;
}

/**
 * @throws {SampleTooSmallError} for fewer than three observed readings
 * @throws {OutsideDomainError} when those do not vary
 */
function standardize(statistic: string, { observed, atMost, atLeast }: CensoredSums): Standardized {
	const { sampleSize, mean: centre, sumOfSquares } = observed;
	if (sampleSize < FEWEST_EXACT)
		throw new SampleTooSmallError(`${statistic} (readings not censored)`, FEWEST_EXACT, sampleSize);
	if (!(sumOfSquares > 0))
		throw new OutsideDomainError(statistic, 'a spread of the readings not censored', 0);
	const scale = Math.sqrt(sumOfSquares / sampleSize);
	const convert = (counts: readonly CensoredCount[]) =>
		counts.map(({ count, bound }) => ({ count, bound: (bound - centre) / scale }));
	return { count: sampleSize, atMost: convert(atMost), atLeast: convert(atLeast), centre, scale };
}

/** The log-likelihood in Olsen's parameters θ = 1/σ and η = μ/σ, in which it is concave. */
function logLikelihood(
	{ count, atMost, atLeast }: Standardized,
	theta: number,
	eta: number
): number {
	let sum = count * (Math.log(theta) - LOG_SQRT_TWO_PI - (theta * theta + eta * eta) / 2);
	for (const at of atMost) sum += at.count * logNormalLowerTail(theta * at.bound - eta);
	for (const at of atLeast) sum += at.count * logNormalLowerTail(eta - theta * at.bound);
	return sum;
}

/** Maximum of the likelihood, by Newton steps that are cut when they overshoot. */
function maximize(sample: Standardized): { theta: number; eta: number; value: number } {
	const { count } = sample;
	let [theta, eta] = [1, 0];
	let value = logLikelihood(sample, theta, eta);
	for (let round = 0; round < 100; round++) {
		let [gt, ge] = [count / theta - theta * count, -eta * count];
		let [tt, te, ee] = [-count / theta ** 2 - count, 0, -count];
		const add = (at: CensoredCount, slope: number, curvature: number) => {
			gt += at.count * slope * at.bound;
			ge -= at.count * slope;
			tt += at.count * curvature * at.bound * at.bound;
			te -= at.count * curvature * at.bound;
			ee += at.count * curvature;
		};
		for (const at of sample.atMost) {
			const z = theta * at.bound - eta;
			const h = normalHazard(z);
			add(at, h, -h * (z + h));
		}
		for (const at of sample.atLeast) {
			const z = eta - theta * at.bound;
			const h = normalHazard(z);
			add(at, -h, -h * (z + h));
		}
		const determinant = tt * ee - te * te;
		const stepTheta = -(ee * gt - te * ge) / determinant;
		const stepEta = -(tt * ge - te * gt) / determinant;
		let cut = 1;
		let next = -Infinity;
		while (cut > 1e-12) {
			const trial = theta + cut * stepTheta;
			if (trial > 0) next = logLikelihood(sample, trial, eta + cut * stepEta);
			if (next >= value - 1e-14 * Math.abs(value)) break;
			cut /= 2;
		}
		theta += cut * stepTheta;
		eta += cut * stepEta;
		value = next;
		if (Math.abs(stepTheta) < 1e-12 * theta && Math.abs(stepEta) < 1e-12 * (1 + Math.abs(eta)))
			return { theta, eta, value };
	}
	throw new NoSolutionError('censoredNormalFit', 'the likelihood did not settle');
}

/**
 * Mean and deviation of a normal population by maximum likelihood, censored readings counted for
 * what they say: at most, at least.
 *
 * Source: Cohen 1959; parameters of Olsen 1978, Econometrica 46.
 *
 * @throws {SampleTooSmallError} for fewer than three readings that are not censored
 * @throws {OutsideDomainError} when those do not vary
 */
export function censoredNormalFit(sample: CensoredSample): CensoredFit {
	return censoredFitOfSums(sumsOf(sample));
}

/** {@link censoredNormalFit} from sums. */
export function censoredFitOfSums(sums: CensoredSums): CensoredFit {
	const tame = standardize('censoredNormalFit', sums);
	const { theta, eta, value } = maximize(tame);
	return {
		mean: tame.centre + (tame.scale * eta) / theta,
		standardDeviation: tame.scale / theta,
		logLikelihood: value - tame.count * Math.log(tame.scale)
	};
}

/** Best likelihood when the P-quantile is held at x: one parameter is left, and its slope is monotone. */
function profile(sample: Standardized, x: number, z: number): number {
	const slope = (logTheta: number) => {
		const theta = Math.exp(logTheta);
		const eta = x * theta - z;
		// Σ (θy − η)(y − x) over the observed, whose mean is 0 and mean square 1.
		let sum = sample.count * (1 / theta - theta - eta * x);
		for (const { count, bound } of sample.atMost)
			sum += count * normalHazard(theta * bound - eta) * (bound - x);
		for (const { count, bound } of sample.atLeast)
			sum += count * normalHazard(eta - theta * bound) * (x - bound);
		return -sum;
	};
	const [lower, upper] = bracketIncreasing(slope, 0, 0.5);
	const theta = Math.exp(findRoot(slope, lower, upper, 1e-13));
	return logLikelihood(sample, theta, x * theta - z);
}

/** 2(ℓ − ℓ profile) of an uncensored sample at its exact tolerance limit: the calibrated threshold. */
function exactThreshold(sampleSize: number, promise: TolerancePromise): number {
	const z = normalQuantile(promise.content);
	const x = oneSidedToleranceFactor(sampleSize, promise) * Math.sqrt(sampleSize / (sampleSize - 1));
	const square = 1 + x * x;
	const theta = (x * z + Math.sqrt(x * x * z * z + 4 * square)) / (2 * square);
	const height = Math.log(theta) - (theta * theta + (x * theta - z) ** 2) / 2;
	return 2 * sampleSize * (-0.5 - height);
}

/**
 * A maximum above the content of a normal population, some readings censored: the profile
 * likelihood of the P-quantile is followed outwards until it has fallen as far as it falls, in an
 * uncensored sample of as many exact readings, at the exact factor k₁. Without censored readings
 * the limit is therefore mean + k₁·s itself; with them it is calibrated by the readings that carry
 * numbers, which is the cautious choice.
 *
 * @throws {SampleTooSmallError} for fewer than three readings that are not censored
 * @throws {OutsideDomainError} when those do not vary
 */
export function censoredMaximum(sample: CensoredSample, promise: TolerancePromise): number {
	return censoredMaximumOfSums(sumsOf(sample), promise);
}

/** {@link censoredMaximum} from sums. */
export function censoredMaximumOfSums(sums: CensoredSums, promise: TolerancePromise): number {
	const tame = standardize('censoredMaximum', sums);
	const threshold = exactThreshold(tame.count, promise);
	const z = normalQuantile(promise.content);
	const { theta, eta, value } = maximize(tame);
	const best = (eta + z) / theta;
	const excess = (x: number) => 2 * (value - profile(tame, x, z)) - threshold;
	let lower = best;
	let upper = best + 1 / theta;
	for (let step = 2 / theta; excess(upper) < 0; step *= 2) [lower, upper] = [upper, upper + step];
	return tame.centre + tame.scale * findRoot(excess, lower, upper, 1e-11);
}

/** A minimum below the content of a normal population; see {@link censoredMaximum}. */
export function censoredMinimum(sample: CensoredSample, promise: TolerancePromise): number {
	return censoredMinimumOfSums(sumsOf(sample), promise);
}

/** {@link censoredMinimum} from sums. */
export function censoredMinimumOfSums(sums: CensoredSums, promise: TolerancePromise): number {
	return -censoredMaximumOfSums(mirrored(sums), promise);
}
