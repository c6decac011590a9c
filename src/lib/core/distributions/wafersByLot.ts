import { groupBy } from '../groupBy';
import { poolGroups, type GroupSums } from '../stats/varianceComponents';
import type { Group } from './summary';

/**
 * The sums of each wafer, independent lot by independent lot, in the order of their names. A lot
 * that was split for assembly keeps its wafers together.
 */
export function wafersByLot(groups: readonly Group[]): GroupSums[][] {
	return inOrder(groupBy(groups, ({ waferLot }) => waferLot)).map((lot) =>
		inOrder(groupBy(lot, ({ wafer }) => wafer)).map(poolGroups)
	);
}

function inOrder<Item>(groups: ReadonlyMap<string, Item[]>): Item[][] {
	return [...groups].sort(([a], [b]) => (a < b ? -1 : 1)).map(([, items]) => items);
}
