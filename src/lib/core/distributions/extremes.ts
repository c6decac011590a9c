import type { Extremes } from './summary';

/** How many devices a side are stored; order statistics reach no deeper. */
export const EXTREMES = 512;

/** The outermost devices of each side. @param sorted ascending */
export function extremesOf(sorted: Float64Array): Extremes {
	const count = Math.min(EXTREMES, sorted.length);
	const lowest = new Array<number>(count);
	const highest = new Array<number>(count);
	for (let i = 0; i < count; i++) {
		lowest[i] = sorted[i]!;
		highest[i] = sorted[sorted.length - 1 - i]!;
	}
	return { lowest, highest };
}
