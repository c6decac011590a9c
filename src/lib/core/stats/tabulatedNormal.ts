import { normalDensity, normalLowerTail } from './normalDistribution';

/** Deviations beyond which the probability is taken for 0 or 1; what is cut off is below 2e-12. */
const REACH = 7;

/** Steps a deviation: the cubic between two of them is within 2e-9 of the probability. */
const STEPS = 32;

const CELLS = 2 * REACH * STEPS;

/** Coefficients of the cubic in each cell, four a cell: Hermite's, from probabilities and densities. */
const cubics = new Float64Array(4 * CELLS);
for (let cell = 0; cell < CELLS; cell++) {
	const [from, to] = [cell / STEPS - REACH, (cell + 1) / STEPS - REACH];
	const start = normalLowerTail(from);
	const rise = normalLowerTail(to) - start;
	const [slopeFrom, slopeTo] = [normalDensity(from) / STEPS, normalDensity(to) / STEPS];
	cubics.set(
		[start, slopeFrom, 3 * rise - 2 * slopeFrom - slopeTo, slopeFrom + slopeTo - 2 * rise],
		4 * cell
	);
}

/**
 * Probability below x of the standard normal to 2e-9, for sums of many thousand of them: a cubic
 * from a table. Where a probability itself is the result, it is `normalLowerTail`, which is accurate
 * to the last digits.
 */
export function tabulatedLowerTail(x: number): number {
	const position = (x + REACH) * STEPS;
	if (!(position > 0)) return 0;
	if (position >= CELLS) return 1;
	const cell = Math.trunc(position);
	const t = position - cell;
	const at = 4 * cell;
	return cubics[at]! + t * (cubics[at + 1]! + t * (cubics[at + 2]! + t * cubics[at + 3]!));
}
