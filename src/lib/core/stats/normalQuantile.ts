import { normalDensity, normalUpperTail } from './normalDistribution';
import { requireProbability } from './requireProbability';

/**
 * The point with probability p below it, for the standard normal. A rational start (Abramowitz and
 * Stegun 26.2.23, four digits) is polished by Halley steps on our own tail, so that quantile and
 * distribution agree to rounding.
 *
 * @throws {OutsideDomainError} unless 0 < p < 1
 * @example normalQuantile(0.975) // 1.959963984540054
 */
export function normalQuantile(probability: number): number {
	requireProbability('normalQuantile', 'a probability', probability);
	return probability < 0.5 ? -positiveQuantile(probability) : positiveQuantile(1 - probability);
}

/** The x ≥ 0 with this probability (at most one half) above it. */
function positiveQuantile(tail: number): number {
	const t = Math.sqrt(-2 * Math.log(tail));
	const numerator = 2.515517 + t * (0.802853 + t * 0.010328);
	const denominator = 1 + t * (1.432788 + t * (0.189269 + t * 0.001308));
	let x = t - numerator / denominator;
	for (let i = 0; i < 3; i++) {
		const newton = (normalUpperTail(x) - tail) / normalDensity(x);
		x += newton / (1 - (x * newton) / 2);
	}
	return x;
}
