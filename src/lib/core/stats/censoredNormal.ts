import { NoSolutionError, OutsideDomainError, SampleTooSmallError } from './errors';
import { bracketIncreasing, findRoot } from './findRoot';
import { normalDensity, normalLowerTail } from './normalDistribution';
import { normalQuantile } from './normalQuantile';
import { oneSidedToleranceFactor, type TolerancePromise } from './toleranceFactor';

/** Readings of which some only say "at most" (left) or "at least" (right). */
export interface CensoredSample {
	readonly exact: readonly number[];
	readonly atMost: readonly number[];
	readonly atLeast: readonly number[];
}

export interface CensoredFit {
	readonly mean: number;
	readonly standardDeviation: number;
	readonly logLikelihood: number;
}

const FEWEST_EXACT = 3;

/** φ/Φ, the slope of ln Φ, without dividing zero by zero far below. */
const hazard = (z: number) => (z > -37 ? normalDensity(z) / normalLowerTail(z) : -z);
const logTail = (z: number) =>
	z > -37 ? Math.log(normalLowerTail(z)) : -(z * z) / 2 - Math.log(-z) - 0.9189385332046727;

/** The log-likelihood in Olsen's parameters θ = 1/σ and η = μ/σ, in which it is concave. */
function logLikelihood(
	{ exact, atMost, atLeast }: CensoredSample,
	theta: number,
	eta: number
): number {
	let sum = exact.length * (Math.log(theta) - 0.9189385332046727);
	for (const y of exact) sum -= (theta * y - eta) ** 2 / 2;
	for (const y of atMost) sum += logTail(theta * y - eta);
	for (const y of atLeast) sum += logTail(eta - theta * y);
	return sum;
}

/** Centre and scale that make the readings tame numbers. */
function standardization({ exact }: CensoredSample) {
	const centre = exact.reduce((sum, y) => sum + y, 0) / exact.length;
	const squares = exact.reduce((sum, y) => sum + (y - centre) ** 2, 0);
	return { centre, scale: Math.sqrt(squares / exact.length) };
}

function standardized(sample: CensoredSample, centre: number, scale: number): CensoredSample {
	const convert = (values: readonly number[]) => values.map((y) => (y - centre) / scale);
	return {
		exact: convert(sample.exact),
		atMost: convert(sample.atMost),
		atLeast: convert(sample.atLeast)
	};
}

function check(statistic: string, sample: CensoredSample): void {
	if (sample.exact.length < FEWEST_EXACT)
		throw new SampleTooSmallError(
			`${statistic} (readings not censored)`,
			FEWEST_EXACT,
			sample.exact.length
		);
	const [first] = sample.exact;
	if (sample.exact.every((y) => y === first))
		throw new OutsideDomainError(statistic, 'a spread of the readings not censored', 0);
}

/** Maximum of the likelihood of standardized readings, by Newton steps that are cut when they overshoot. */
function maximize(sample: CensoredSample): { theta: number; eta: number; value: number } {
	let [theta, eta] = [1, 0];
	let value = logLikelihood(sample, theta, eta);
	for (let round = 0; round < 100; round++) {
		let [gt, ge] = [sample.exact.length / theta, 0];
		let [tt, te, ee] = [-sample.exact.length / theta ** 2, 0, 0];
		const add = (y: number, slope: number, curvature: number) => {
			gt += slope * y;
			ge -= slope;
			tt += curvature * y * y;
			te -= curvature * y;
			ee += curvature;
		};
		for (const y of sample.exact) add(y, -(theta * y - eta), -1);
		for (const y of sample.atMost) {
			const z = theta * y - eta;
			const h = hazard(z);
			add(y, h, -h * (z + h));
		}
		for (const y of sample.atLeast) {
			const z = eta - theta * y;
			const h = hazard(z);
			add(y, -h, -h * (z + h));
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
	check('censoredNormalFit', sample);
	const { centre, scale } = standardization(sample);
	const { theta, eta, value } = maximize(standardized(sample, centre, scale));
	return {
		mean: centre + (scale * eta) / theta,
		standardDeviation: scale / theta,
		logLikelihood: value - sample.exact.length * Math.log(scale)
	};
}

/** Best likelihood when the P-quantile is held at x: one parameter is left, and its slope is monotone. */
function profile(sample: CensoredSample, x: number, z: number): number {
	const slope = (logTheta: number) => {
		const theta = Math.exp(logTheta);
		const eta = x * theta - z;
		let sum = sample.exact.length / theta;
		for (const y of sample.exact) sum -= (theta * y - eta) * (y - x);
		for (const y of sample.atMost) sum += hazard(theta * y - eta) * (y - x);
		for (const y of sample.atLeast) sum += hazard(eta - theta * y) * (x - y);
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
	check('censoredMaximum', sample);
	const threshold = exactThreshold(sample.exact.length, promise);
	const z = normalQuantile(promise.content);
	const { centre, scale } = standardization(sample);
	const tame = standardized(sample, centre, scale);
	const { theta, eta, value } = maximize(tame);
	const best = (eta + z) / theta;
	const excess = (x: number) => 2 * (value - profile(tame, x, z)) - threshold;
	let lower = best;
	let upper = best + 1 / theta;
	for (let step = 2 / theta; excess(upper) < 0; step *= 2) [lower, upper] = [upper, upper + step];
	return centre + scale * findRoot(excess, lower, upper, 1e-11);
}

/** A minimum below the content of a normal population; see {@link censoredMaximum}. */
export function censoredMinimum(sample: CensoredSample, promise: TolerancePromise): number {
	const mirrored = {
		exact: sample.exact.map((y) => -y),
		atMost: sample.atLeast.map((y) => -y),
		atLeast: sample.atMost.map((y) => -y)
	};
	return -censoredMaximum(mirrored, promise);
}
