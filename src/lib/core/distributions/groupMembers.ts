import { sortNumbers } from '../stats/sortNumbers';
import type { GroupName } from './indexDevices';

/** The devices that share a lot and wafer, their values ascending. */
export interface Members {
	readonly name: GroupName;
	readonly sorted: Float64Array;
}

/** The same with what is summed up of each, as ascending as the values. */
export interface TransformedMembers extends Members {
	readonly transformed: Float64Array;
}

/**
 * Sorts values by the group of their device; values that are NaN and groups without any are left
 * out. Ascending order makes every sum over them the same in whatever order devices come.
 */
export function groupMembers(
	values: Float64Array,
	groupOf: Int32Array,
	groups: readonly GroupName[]
): Members[] {
	const sizes = new Int32Array(groups.length);
	for (let device = 0; device < values.length; device++)
		if (!Number.isNaN(values[device]!)) sizes[groupOf[device]!]! += 1;
	const members = groups.map((_, group) => new Float64Array(sizes[group] ?? 0));
	const filled = new Int32Array(groups.length);
	for (let device = 0; device < values.length; device++) {
		const value = values[device]!;
		if (Number.isNaN(value)) continue;
		const group = groupOf[device]!;
		members[group]![filled[group]!++] = value;
	}
	return groups.flatMap((name, group) => {
		const unsorted = members[group]!;
		return unsorted.length === 0 ? [] : [{ name, sorted: sortNumbers(unsorted) }];
	});
}
