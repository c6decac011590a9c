import { findRoot } from './findRoot';
import { incompleteBeta } from './incompleteBeta';
import { requireProbability } from './requireProbability';

/** Degrees of freedom of a ratio of two mean squares. */
export interface FDegrees {
	readonly numerator: number;
	readonly denominator: number;
}

/**
 * Probability of Fisher's F above x: the p-value of a ratio of mean squares.
 *
 * @example fUpperTail(19.95, { numerator: 2, denominator: 72 }) // 1.3e-7
 */
export function fUpperTail(x: number, { numerator, denominator }: FDegrees): number {
	if (x <= 0) return 1;
	if (x === Infinity) return 0;
	const total = denominator + numerator * x;
	return incompleteBeta(
		denominator / 2,
		numerator / 2,
		denominator / total,
		(numerator * x) / total
	).lower;
}

/**
 * The point of F with probability p below it.
 *
 * @throws {OutsideDomainError} unless 0 < p < 1
 */
export function fQuantile(probability: number, degrees: FDegrees): number {
	requireProbability('fQuantile', 'a probability', probability);
	const { numerator, denominator } = degrees;
	const excess = (logX: number) => {
		const x = Math.exp(logX);
		const total = denominator + numerator * x;
		const tails = incompleteBeta(
			denominator / 2,
			numerator / 2,
			denominator / total,
			(numerator * x) / total
		);
		return probability < 0.5
			? Math.log(tails.upper / probability)
			: Math.log((1 - probability) / tails.lower);
	};
	let lower = -1;
	let upper = 1;
	for (let step = 1; excess(lower) > 0; step *= 2) [lower, upper] = [lower - step, lower];
	for (let step = 1; excess(upper) < 0; step *= 2) [lower, upper] = [upper, upper + step];
	return Math.exp(findRoot(excess, lower, upper, 1e-15));
}
