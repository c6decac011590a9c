import { expect, it } from 'vitest';
import { readSorting, sortHref } from './sorting';

const columns = ['partNumber', 'lots'];
const fallback = { column: 'partNumber', order: 'ascending' } as const;

it.each([
	['', fallback],
	['sort=lots', { column: 'lots', order: 'ascending' }],
	['sort=lots&order=descending', { column: 'lots', order: 'descending' }],
	['sort=lots&order=sideways', { column: 'lots', order: 'ascending' }],
	['sort=password&order=descending', fallback]
])('reads "%s"', (search, sorting) =>
	expect(readSorting(new URLSearchParams(search), columns, fallback)).toEqual(sorting)
);

it('sorts by another column upwards and keeps the filter', () => {
	expect(sortHref(new URLSearchParams('class=tuning'), 'lots', fallback)).toBe(
		'?class=tuning&sort=lots&order=ascending'
	);
});

it('turns the order round on the sorted column', () => {
	expect(sortHref(new URLSearchParams(''), 'partNumber', fallback)).toBe(
		'?sort=partNumber&order=descending'
	);
	expect(sortHref(new URLSearchParams(''), 'lots', { column: 'lots', order: 'descending' })).toBe(
		'?sort=lots&order=ascending'
	);
});
