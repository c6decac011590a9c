/** Which column a table is sorted by, and which way. */
export interface Sorting {
	readonly column: string;
	readonly order: 'ascending' | 'descending';
}

/** Reads `?sort=lots&order=descending`; anything unknown falls back. */
export function readSorting(
	search: URLSearchParams,
	columns: readonly string[],
	fallback: Sorting
): Sorting {
	const column = search.get('sort');
	if (column === null || !columns.includes(column)) return fallback;
	return { column, order: search.get('order') === 'descending' ? 'descending' : 'ascending' };
}

/** Where the head of a column leads: sorts by it, or turns the order round when it is sorted already. */
export function sortHref(search: URLSearchParams, column: string, sorting: Sorting): string {
	const next = new URLSearchParams(search);
	next.set('sort', column);
	next.set(
		'order',
		sorting.column === column && sorting.order === 'ascending' ? 'descending' : 'ascending'
	);
	return `?${next.toString()}`;
}
