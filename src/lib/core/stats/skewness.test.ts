import { expect, it } from 'vitest';
import { SampleTooSmallError } from './errors';
import { skewness } from './skewness';

// SciPy 1.17.1: stats.skew
it('matches SciPy', () => {
	expect(skewness([1, 2, 2, 3, 9])).toBeCloseTo(1.321086967875271, 13);
	expect(skewness([2, 4, 4, 4, 5, 5, 7, 9])).toBeCloseTo(0.65625, 13);
});

it('is zero without spread, and refused for two devices', () => {
	expect(skewness([5, 5, 5])).toBe(0);
	expect(() => skewness([1, 2])).toThrow(SampleTooSmallError);
});
