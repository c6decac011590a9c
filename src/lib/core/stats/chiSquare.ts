import { findRoot } from './findRoot';
import { gammaPrefactor, incompleteGamma } from './incompleteGamma';
import { normalQuantile } from './normalQuantile';
import { requireProbability } from './requireProbability';

/** Density of chi-square with the given (not necessarily whole) degrees of freedom, for x > 0. */
export function chiSquareDensity(x: number, degrees: number): number {
	return x > 0 ? (gammaPrefactor(degrees / 2)(x / 2) * degrees) / (2 * x) : 0;
}

/** Probability of chi-square below x. */
export function chiSquareLowerTail(x: number, degrees: number): number {
	return incompleteGamma(degrees / 2, Math.max(0, x) / 2).lower;
}

/** Probability of chi-square above x. */
export function chiSquareUpperTail(x: number, degrees: number): number {
	return incompleteGamma(degrees / 2, Math.max(0, x) / 2).upper;
}

/**
 * The point with probability p below it: bracketed from the Wilson–Hilferty cube, then solved on
 * the distribution itself, in ln x.
 *
 * @throws {OutsideDomainError} unless 0 < p < 1
 * @example chiSquareQuantile(0.01, 42) // 23.650094…, NIST/SEMATECH 7.2.6.3
 */
export function chiSquareQuantile(probability: number, degrees: number): number {
	requireProbability('chiSquareQuantile', 'a probability', probability);
	const small = probability < 0.5;
	const excess = (logX: number) => {
		const tails = incompleteGamma(degrees / 2, Math.exp(logX) / 2);
		return small ? Math.log(tails.lower / probability) : Math.log((1 - probability) / tails.upper);
	};
	const h = 2 / (9 * degrees);
	const cube = (1 - h + normalQuantile(probability) * Math.sqrt(h)) ** 3;
	const guess = Math.log(cube > 0.001 ? degrees * cube : degrees * 0.001);
	let lower = guess - 0.01;
	let upper = guess + 0.01;
	for (let step = 0.02; excess(lower) > 0; step *= 2) [lower, upper] = [lower - step, lower];
	for (let step = 0.02; excess(upper) < 0; step *= 2) [lower, upper] = [upper, upper + step];
	return Math.exp(findRoot(excess, lower, upper, 1e-15));
}
