import { describe, expect, it } from 'vitest';
import { columnDecimals, decimalsOf, paddingAfter, setNumber } from './decimals';

describe('numbers of a column', () => {
	it.each([
		['12.50', 2],
		['7', 0],
		['−0.125', 3],
		['-0.1', 1],
		['+9.4', 1],
		['chosen', 0],
		['1.2.3', 0]
	])('%s has %i decimals', (text, decimals) => expect(decimalsOf(text)).toBe(decimals));

	it('takes the decimals of a column from its finest number', () => {
		expect(columnDecimals(['35.7', null, '6.61', '120', undefined])).toBe(2);
		expect(columnDecimals([])).toBe(0);
	});

	it.each([
		['12.5', 3, '00'],
		['7', 3, '.000'],
		['6.61', 2, ''],
		['12.625', 2, ''],
		['−3', 1, '.0'],
		[null, 2, '.00'],
		[null, 0, ''],
		['chosen', 2, '']
	])('pads %s in a column of %i decimals by "%s"', (text, decimals, padding) =>
		expect(paddingAfter(text, decimals)).toBe(padding)
	);

	it('sets a true minus, and an en dash for no value', () => {
		expect(setNumber('-55')).toBe('\u221255');
		expect(setNumber('1e-3')).toBe('1e-3');
		expect(setNumber(null)).toBe('\u2013');
	});
});
