import { OutsideDomainError } from './errors';

const HALF_LOG_TWO_PI = Math.log(2 * Math.PI) / 2;

/** Terms B₂ₖ/(2k(2k−1)) of Stirling's series (Abramowitz and Stegun 6.1.41). */
const STIRLING = [
	1 / 12,
	-1 / 360,
	1 / 1260,
	-1 / 1680,
	1 / 1188,
	-691 / 360360,
	1 / 156,
	-3617 / 122400
] as const;

/** Where eight terms of the series reach double precision. */
const ASYMPTOTIC_FROM = 12;

function series(x: number): number {
	const inverseSquare = 1 / (x * x);
	let sum = 0;
	for (let i = STIRLING.length - 1; i >= 0; i--) sum = sum * inverseSquare + STIRLING[i]!;
	return sum / x;
}

/** (x + ½) ln(1 + 1/x) − 1, what the error below loses from x to x + 1; artanh series, x ≥ ½. */
function lossOfOneStep(x: number): number {
	const square = 1 / (2 * x + 1) ** 2;
	let [term, sum] = [1, 0];
	for (let k = 3; k < 80; k += 2) {
		term *= square;
		sum += term / k;
		if (term < sum * 1e-17) break;
	}
	return sum;
}

/**
 * ln Γ(x+1) − (x + ½) ln x + x − ln √(2π) for x ≥ ½: what Stirling's formula misses. Small for large
 * x, where ln Γ itself has lost the digits a density needs.
 *
 * Source: the quantity of Loader 2000, Fast and accurate computation of binomial probabilities.
 */
export function stirlingError(x: number): number {
	let sum = 0;
	let shifted = x;
	for (; shifted < ASYMPTOTIC_FROM; shifted++) sum += lossOfOneStep(shifted);
	return sum + series(shifted);
}

/**
 * ln Γ(x) for x > 0.
 *
 * @throws {OutsideDomainError} unless x > 0
 * @example logGamma(0.5) // 0.5723649429247001, half of ln π
 */
export function logGamma(x: number): number {
	if (!(x > 0)) throw new OutsideDomainError('logGamma', 'a positive number', x);
	if (x < 0.5) return logGamma(x + 1) - Math.log(x);
	return (x - 0.5) * Math.log(x) - x + HALF_LOG_TWO_PI + stirlingError(x);
}
