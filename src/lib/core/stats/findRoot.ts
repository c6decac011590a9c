import { NoSolutionError } from './errors';

/**
 * The zero of a continuous function inside a bracket, by Brent's method: inverse quadratic
 * interpolation where it behaves, bisection where it does not, so that it always ends.
 *
 * Source: Brent 1973, Algorithms for Minimization without Derivatives, chapter 4.
 *
 * @param tolerance - width of the last bracket relative to the root, default 4e-15
 * @throws {NoSolutionError} when the function has the same sign at both ends
 * @example findRoot((x) => x * x - 2, 0, 2) // 1.414213562373095
 */
export function findRoot(
	f: (x: number) => number,
	lower: number,
	upper: number,
	tolerance = 4e-15
): number {
	let [best, other] = [upper, lower];
	let [fBest, fOther] = [f(best), f(other)];
	if (!(fBest * fOther <= 0)) throw new NoSolutionError('findRoot', 'no change of sign');

	let [contra, fContra] = [other, fOther];
	let step = best - other;
	let previousStep = step;
	for (let iteration = 0; iteration < 200; iteration++) {
		if (fBest > 0 === fContra > 0) {
			[contra, fContra] = [other, fOther];
			step = previousStep = best - other;
		}
		if (Math.abs(fContra) < Math.abs(fBest)) {
			[other, best, contra] = [best, contra, best];
			[fOther, fBest, fContra] = [fBest, fContra, fBest];
		}
		const enough = tolerance * Math.abs(best) + Number.MIN_VALUE;
		const half = (contra - best) / 2;
		if (Math.abs(half) <= enough || fBest === 0) return best;

		if (Math.abs(previousStep) < enough || Math.abs(fOther) <= Math.abs(fBest)) {
			step = previousStep = half;
		} else {
			const [numerator, denominator] = interpolate(best, other, contra, fBest, fOther, fContra);
			const acceptable =
				2 * numerator <
				Math.min(
					3 * half * denominator - Math.abs(enough * denominator),
					Math.abs(previousStep * denominator)
				);
			if (acceptable) {
				previousStep = step;
				step = numerator / denominator;
			} else {
				step = previousStep = half;
			}
		}
		[other, fOther] = [best, fBest];
		best += Math.abs(step) > enough ? step : Math.sign(half) * enough;
		fBest = f(best);
	}
	throw new NoSolutionError('findRoot', 'did not converge in 200 steps');
}

/** Numerator (not negative) and signed denominator of the secant or inverse quadratic step. */
function interpolate(
	best: number,
	other: number,
	contra: number,
	fBest: number,
	fOther: number,
	fContra: number
): readonly [number, number] {
	const s = fBest / fOther;
	let p: number;
	let q: number;
	if (other === contra) {
		p = (contra - best) * s;
		q = 1 - s;
	} else {
		const r = fBest / fContra;
		const t = fOther / fContra;
		p = s * ((contra - best) * t * (t - r) - (best - other) * (r - 1));
		q = (t - 1) * (r - 1) * (s - 1);
	}
	return p > 0 ? [p, -q] : [-p, q];
}

/**
 * A bracket around the zero of an increasing function: steps away from a guess, doubling.
 *
 * @throws {NoSolutionError} when no change of sign is met
 */
export function bracketIncreasing(
	f: (x: number) => number,
	guess: number,
	firstStep: number
): readonly [number, number] {
	let lower = guess;
	let upper = guess;
	let step = firstStep;
	if (f(guess) > 0) {
		for (let i = 0; i < 200; i++, step *= 2) {
			upper = lower;
			lower -= step;
			if (f(lower) <= 0) return [lower, upper];
		}
	} else {
		for (let i = 0; i < 200; i++, step *= 2) {
			lower = upper;
			upper += step;
			if (f(upper) >= 0) return [lower, upper];
		}
	}
	throw new NoSolutionError('bracketIncreasing', 'no change of sign');
}
