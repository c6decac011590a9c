import { expect, it } from 'vitest';
import { OutsideDomainError, SampleTooSmallError } from './errors';
import { quantile } from './quantile';

// R 4.2.2: quantile(c(3.1,4.7,1.2,9.9,5.5,2.2,7.3), p, type = 8)
it.each([
	[0, 1.2],
	[0.01, 1.2],
	[0.1, 1.266666666666667],
	[0.25, 2.35],
	[0.5, 4.7],
	[0.6, 5.286666666666666],
	[0.95, 9.9],
	[1, 9.9]
])('matches R at %f', (probability, value) => {
	expect(quantile([1.2, 2.2, 3.1, 4.7, 5.5, 7.3, 9.9], probability)).toBeCloseTo(value, 14);
});

it('refuses no values, and what is no probability', () => {
	expect(() => quantile([], 0.5)).toThrow(SampleTooSmallError);
	expect(() => quantile([1, 2], 1.5)).toThrow(OutsideDomainError);
});
