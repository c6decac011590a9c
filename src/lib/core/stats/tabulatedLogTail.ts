import { logNormalLowerTail, normalHazard } from './logNormalTail';

/** The table reaches so many deviations to both sides; beyond, the logarithm itself is taken. */
const REACH = 8;

/** Steps a deviation: the cubic between two of them is within 5e-12 of the logarithm. */
const STEPS = 128;

const CELLS = 2 * REACH * STEPS;

/** Coefficients of Hermite's cubic in each cell, four a cell. */
const cubics = new Float64Array(4 * CELLS);
for (let cell = 0; cell < CELLS; cell++) {
	const [from, to] = [cell / STEPS - REACH, (cell + 1) / STEPS - REACH];
	const start = logNormalLowerTail(from);
	const rise = logNormalLowerTail(to) - start;
	const [slopeFrom, slopeTo] = [normalHazard(from) / STEPS, normalHazard(to) / STEPS];
	cubics.set(
		[start, slopeFrom, 3 * rise - 2 * slopeFrom - slopeTo, slopeFrom + slopeTo - 2 * rise],
		4 * cell
	);
}

/** ln Φ(z) to 5e-12, for statistics that sum it over many thousand devices. */
export function tabulatedLogTail(z: number): number {
	const position = (z + REACH) * STEPS;
	if (!(position >= 0 && position < CELLS)) return logNormalLowerTail(z);
	const cell = Math.trunc(position);
	const t = position - cell;
	const at = 4 * cell;
	return cubics[at]! + t * (cubics[at + 1]! + t * (cubics[at + 2]! + t * cubics[at + 3]!));
}
