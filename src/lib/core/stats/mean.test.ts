import { expect, it } from 'vitest';
import { SampleTooSmallError } from './errors';
import { mean } from './mean';

it('is the arithmetic mean', () => {
	expect(mean([1, 2, 6])).toBe(3);
	expect(mean(Float64Array.of(0.1, 0.2, 0.3))).toBeCloseTo(0.2, 16);
});

it('refuses no values', () => {
	expect(() => mean([])).toThrow(SampleTooSmallError);
});
