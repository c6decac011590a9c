import { findRoot } from './findRoot';
import { incompleteBeta } from './incompleteBeta';
import { requireProbability } from './requireProbability';

/** Probability of Student's t above x; the degrees of freedom may be fractional. */
export function studentTUpperTail(x: number, degrees: number): number {
	const square = x * x;
	const tails = incompleteBeta(
		degrees / 2,
		0.5,
		degrees / (degrees + square),
		square / (degrees + square)
	);
	return x >= 0 ? tails.lower / 2 : 0.5 + tails.upper / 2;
}

/** Probability of Student's t below x. */
export function studentTLowerTail(x: number, degrees: number): number {
	return studentTUpperTail(-x, degrees);
}

/**
 * The point with probability p below it, for Student's t.
 *
 * @throws {OutsideDomainError} unless 0 < p < 1
 * @example studentTQuantile(0.975, 9) // 2.262157…
 */
export function studentTQuantile(probability: number, degrees: number): number {
	requireProbability('studentTQuantile', 'a probability', probability);
	if (probability === 0.5) return 0;
	const tail = Math.min(probability, 1 - probability);
	const excess = (logX: number) => Math.log(tail / studentTUpperTail(Math.exp(logX), degrees));
	let lower = -1;
	let upper = 1;
	for (let step = 1; excess(lower) > 0; step *= 2) [lower, upper] = [lower - step, lower];
	for (let step = 1; excess(upper) < 0; step *= 2) [lower, upper] = [upper, upper + step];
	const size = Math.exp(findRoot(excess, lower, upper, 1e-15));
	return probability < 0.5 ? -size : size;
}
