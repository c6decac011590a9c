import type { Distribution, Group } from '../distributions/summary';
import { poolGroups, type GroupSums } from '../stats/varianceComponents';

/** The devices of one independent lot (wafer lot), its wafers taken together. */
export interface IndependentLot extends GroupSums {
	readonly name: string;
	/** Smallest and largest value, SI. */
	readonly lowest: number;
	readonly highest: number;
}

/** The stored sums by wafer lot, in the order of their names. */
export function independentLots({ groups }: Pick<Distribution, 'groups'>): IndependentLot[] {
	const byName = new Map<string, Group[]>();
	for (const group of groups) {
		byName.set(group.waferLot, [...(byName.get(group.waferLot) ?? []), group]);
	}
	return [...byName]
		.sort(([a], [b]) => (a < b ? -1 : 1))
		.map(([name, of]) => ({
			name,
			...poolGroups(of),
			lowest: Math.min(...of.map(({ lowest }) => lowest)),
			highest: Math.max(...of.map(({ highest }) => highest))
		}));
}
