import type { Distribution } from '../distributions/summary';
import type { Side } from './allowance';

/** A file's 12.50 pF read into farad isn't the binary 12.50e-12 of a limit. */
const NOISE = 1e-12;

/**
 * How many stored devices lie beyond a limit, from the outermost ones.
 *
 * @param limit in SI
 * @returns `undefined` where the devices aren't stored one by one so far inside
 */
export function countBeyond(
	{ extremes, sampleSize }: Pick<Distribution, 'extremes' | 'sampleSize'>,
	side: Side,
	limit: number
): number | undefined {
	const slack = Math.abs(limit) * NOISE;
	const stored = side === 'minimum' ? extremes.lowest : extremes.highest;
	const inside = stored.findIndex((value) =>
		side === 'minimum' ? value >= limit - slack : value <= limit + slack
	);
	if (inside >= 0) return inside;
	return stored.length === sampleSize ? sampleSize : undefined;
}
