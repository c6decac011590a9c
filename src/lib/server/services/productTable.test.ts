import { describe, expect, it } from 'vitest';
import type { DatasheetState } from '$lib/core/review/datasheetState';
import { selectProducts, type ProductRow, type ProductSelection } from './productTable';

const none: DatasheetState = { release: null, openRevision: null, draft: null };

const row = (partNumber: string, given: Partial<ProductRow> = {}): ProductRow => ({
	partNumber,
	productClass: 'tuning',
	className: 'Tuning diode',
	package: 'SOD-323',
	description: '',
	elements: 1,
	dieName: 'T-12',
	lots: 3,
	temperaturesCelsius: [],
	datasheet: none,
	datasheetText: 'none yet',
	...given
});

const rows = Object.freeze([
	row('LKT-1130', { datasheet: { ...none, draft: 'production' }, description: 'Hyperabrupt' }),
	row('LKT-900', { lots: 8, package: 'SOD-523' }),
	row('LKR-2406', { productClass: 'rectifier', className: 'Schottky rectifier', lots: 1 })
]);

const partNumbers = (selection: ProductSelection) =>
	selectProducts(rows, selection).map(({ partNumber }) => partNumber);

describe('the table of products', () => {
	it.each<[string, ProductSelection, string[]]>([
		['by part number, digits as numbers', {}, ['LKR-2406', 'LKT-900', 'LKT-1130']],
		['turned round', { order: 'descending' }, ['LKT-1130', 'LKT-900', 'LKR-2406']],
		['by lots', { column: 'lots' }, ['LKR-2406', 'LKT-1130', 'LKT-900']],
		['by package, then part number', { column: 'package' }, ['LKR-2406', 'LKT-1130', 'LKT-900']],
		['of one class', { productClass: 'rectifier' }, ['LKR-2406']],
		['of one package', { package: 'SOD-523' }, ['LKT-900']],
		['at one stage', { stage: 'draft' }, ['LKT-1130']],
		['with a word of the description', { search: 'hyper' }, ['LKT-1130']],
		['with every word searched', { search: 'lkt schottky' }, []],
		['of a class nobody makes', { productClass: 'laser' }, []]
	])('lists them %s', (_how, selection, expected) =>
		expect(partNumbers(selection)).toEqual(expected)
	);
});
