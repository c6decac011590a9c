import type { Binding, LimitBinding, StruckOut, TableBinding } from './binding';

/** Where a limit goes: a slot, or one bias of a table's slot. */
export interface LimitAddress {
	readonly slot: string;
	readonly bias: number | null;
}

type Filling = LimitBinding | StruckOut | null;

/**
 * The slot's binding once this place is filled; `null` when nothing is left in it. The other rows of
 * a table stay as they are.
 */
export function bindPlace(
	held: Binding | undefined,
	{ bias }: LimitAddress,
	filling: Filling
): Binding | null {
	if (bias === null) return filling;
	const rows = held?.kind === 'table' ? held.rows.filter((row) => row.bias !== bias) : [];
	const next = filling === null ? rows : [...rows, { bias, binding: filling }];
	if (next.length === 0) return null;
	const table: TableBinding = { kind: 'table', rows: next.toSorted((a, b) => a.bias - b.bias) };
	return table;
}
