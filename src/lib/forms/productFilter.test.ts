import { expect, it } from 'vitest';
import { readProductFilter } from './productFilter';

const nothing = {
	search: '',
	productClass: undefined,
	package: undefined,
	stage: undefined,
	column: 'partNumber',
	order: 'ascending'
};

it.each([
	['', nothing],
	['search=+LKT+&class=tuning', { ...nothing, search: 'LKT', productClass: 'tuning' }],
	['class=&package=&state=', nothing],
	['package=SOD-323&state=inReview', { ...nothing, package: 'SOD-323', stage: 'inReview' }],
	['sort=lots&order=descending', { ...nothing, column: 'lots', order: 'descending' }],
	['class=laser&state=toString&sort=password&order=sideways', nothing]
])('reads "%s"', (search, expected) =>
	expect(readProductFilter(new URLSearchParams(search))).toEqual(expected)
);
