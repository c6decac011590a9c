import { normalDensity, normalLowerTail } from './normalDistribution';

/** Deviations beyond which the probability is taken for 0 or 1; what is cut off is below 1e-12. */
const REACH = 7;

/** Steps a deviation: the cubic between two of them is within 2e-9 of the probability. */
const STEPS = 32;

const SIZE = 2 * REACH * STEPS + 1;

/** Probability below each point of the table, and its slope a step. */
const lowerTail = Float64Array.from({ length: SIZE }, (_, i) => normalLowerTail(i / STEPS - REACH));
const slope = Float64Array.from(
	{ length: SIZE },
	(_, i) => normalDensity(i / STEPS - REACH) / STEPS
);

/**
 * Probability below x of the standard normal to 2e-9, for sums of many thousand of them: cubic
 * Hermite interpolation in a table. Where a probability itself is the result, it is
 * `normalLowerTail`, which is accurate to the last digits.
 */
export function tabulatedLowerTail(x: number): number {
	const position = (x + REACH) * STEPS;
	if (!(position > 0)) return 0;
	const at = Math.trunc(position);
	if (at >= SIZE - 1) return 1;
	const t = position - at;
	const [from, to] = [lowerTail[at]!, lowerTail[at + 1]!];
	const [rise, slopeFrom, slopeTo] = [to - from, slope[at]!, slope[at + 1]!];
	const bend = slopeTo - rise - (rise - slopeFrom);
	return from + t * (slopeFrom + t * (rise - slopeFrom - bend + t * bend));
}
