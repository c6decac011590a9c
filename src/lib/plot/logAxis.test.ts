import { describe, expect, it } from 'vitest';
import { logAxis, wholeDigitAbove } from './logAxis';

describe('a logarithmic axis', () => {
	it('has lines at every digit, exact decimals, and labels at 1, 2, 3 and 5', () => {
		expect(logAxis(0.25, 3)).toEqual({
			domain: [0.25, 3],
			lines: [0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1, 2, 3],
			decades: [1],
			labels: [0.3, 0.5, 1, 2, 3]
		});
	});

	it('thins its labels out over many decades', () => {
		expect(logAxis(1, 1000).labels).toEqual([1, 2, 5, 10, 20, 50, 100, 200, 500, 1000]);
		expect(logAxis(1, 1e5).labels).toEqual([1, 10, 100, 1000, 10_000, 100_000]);
	});

	it.each([
		[28, 30],
		[30, 30],
		[0.31, 0.4],
		[96, 100],
		[1, 1]
	])('ends %d at %d', (value, end) => {
		expect(wholeDigitAbove(value)).toBe(end);
	});
});
