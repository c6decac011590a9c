import { describe, expect, it } from 'vitest';
import { readNumber } from './readNumber';

describe('readNumber', () => {
	it.each([
		['12.5', '.', 12.5],
		[' +1.25e-11 ', '.', 1.25e-11],
		['.5', '.', 0.5],
		['5.', '.', 5],
		['\u22120.3', '.', -0.3],
		['12,5', ',', 12.5],
		['1,25E-11', ',', 1.25e-11],
		['7', ',', 7]
	] as const)('%s with the mark %s is %d', (text, mark, expected) => {
		expect(readNumber(text, mark)).toBe(expected);
	});

	it.each([
		['', '.'],
		['NaN', '.'],
		['inf', '.'],
		['1,234.5', '.'],
		['12.5', ','],
		['12.5 pF', '.'],
		['0x10', '.'],
		['1e999', '.'],
		['-', '.'],
		['.', '.'],
		['1 234', '.']
	] as const)('refuses “%s” with the mark %s', (text, mark) => {
		expect(readNumber(text, mark)).toBeUndefined();
	});
});
