import type { Extremes } from './summary';

/** How many devices a side are stored; order statistics reach no deeper. */
export const EXTREMES = 512;

/** The outermost devices of each side. @param sorted ascending */
export function extremesOf(sorted: Float64Array): Extremes {
	return {
		lowest: [...sorted.subarray(0, EXTREMES)],
		highest: [...sorted.subarray(Math.max(0, sorted.length - EXTREMES))].reverse()
	};
}
