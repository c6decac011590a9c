import { CensoringError } from './errors';
import type { Censoring } from './summary';

/** One value a device, NaN without one, and what it says: at most (−1), exactly (0), at least (1). */
export interface FlaggedReadings {
	readonly values: Float64Array;
	readonly censored: Int8Array;
}

/**
 * Flags the readings at or beyond what the instrument can tell: a leakage of 0 A above a floor of
 * 0.1 nA says "at most 0.1 nA", which is the value it gets. Nothing is dropped.
 *
 * @param range.floor smallest value that can be told, SI; without one nothing is censored below
 * @param range.ceiling largest value that can be told (a clamp), SI
 */
export function censorReadings(
	values: Float64Array,
	{ floor = -Infinity, ceiling = Infinity }: { readonly floor?: number; readonly ceiling?: number }
): FlaggedReadings {
	if (!(floor < ceiling)) throw new CensoringError(floor, ceiling);
	const censored = Int8Array.from(values, (value) =>
		value <= floor ? -1 : value >= ceiling ? 1 : 0
	);
	return {
		values: values.map((value) => Math.min(Math.max(value, floor), ceiling)),
		censored
	};
}

/**
 * One floor and one ceiling for devices that may have been censored at several (two testers): the
 * largest floor and the smallest ceiling, and every device beyond them is censored there. What is at
 * most 0.1 nA is at most 0.2 nA too: a weaker statement, but a true one, and ranks stay in order.
 *
 * @returns `undefined` when no device is flagged
 * @throws {CensoringError} when the floor is not below the ceiling
 */
export function censoringOf({ values, censored }: FlaggedReadings): Censoring | undefined {
	let [floor, ceiling] = [-Infinity, Infinity];
	for (const [device, value] of values.entries()) {
		if (censored[device] === -1 && value > floor) floor = value;
		if (censored[device] === 1 && value < ceiling) ceiling = value;
	}
	if (floor === -Infinity && ceiling === Infinity) return undefined;
	if (!(floor < ceiling)) throw new CensoringError(floor, ceiling);
	return {
		atOrBelow: values.filter((value) => value <= floor).length,
		floor: floor === -Infinity ? null : floor,
		atOrAbove: values.filter((value) => value >= ceiling).length,
		ceiling: ceiling === Infinity ? null : ceiling
	};
}
