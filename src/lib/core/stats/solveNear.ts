import { bracketIncreasing, findRoot } from './findRoot';

/** Relative to the solution or the scale, whichever is larger. */
const TOLERANCE = 1e-9;
const ROUNDS = 8;

/**
 * The zero of an increasing function that is dear to evaluate and of which a cheap likeness is at
 * hand: the likeness is solved first, and its solution and slope lead to the zero in two or three
 * secant steps. Where they do not, the zero is bracketed.
 *
 * @param guess - where to begin with the likeness
 * @param scale - a step that is neither tiny nor huge
 * @throws {NoSolutionError} when no change of sign is met
 */
export function solveNear(
	excess: (x: number) => number,
	likeness: (x: number) => number,
	guess: number,
	scale: number
): number {
	const start = findRoot(likeness, ...bracketIncreasing(likeness, guess, scale), 1e-6);
	const near = start + scale * 1e-4;
	let slope = (likeness(near) - likeness(start)) / (near - start);
	let [x, value] = [start, excess(start)];
	for (let round = 0; round < ROUNDS; round++) {
		const next = x - value / slope;
		if (!(Math.abs(next - start) <= scale)) break;
		if (Math.abs(next - x) <= TOLERANCE * Math.max(scale, Math.abs(next))) return next;
		const valueThere = excess(next);
		slope = valueThere === value ? slope : (valueThere - value) / (next - x);
		[x, value] = [next, valueThere];
	}
	return findRoot(excess, ...bracketIncreasing(excess, start, scale / 1000), TOLERANCE);
}
