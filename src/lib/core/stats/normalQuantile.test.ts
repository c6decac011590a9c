import fc from 'fast-check';
import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { normalLowerTail } from './normalDistribution';
import { normalQuantile } from './normalQuantile';

// SciPy 1.17.1: stats.norm.ppf
it.each([
	[1e-12, -7.034483825301131],
	[0.001, -3.090232306167813],
	[0.3, -0.5244005127080409],
	[0.5, 0],
	[0.9, 1.2815515655446004],
	[0.999999, 4.753424308817087]
])('matches SciPy at %f', (probability, quantile) => {
	expect(normalQuantile(probability)).toBeCloseTo(quantile, 13);
});

it('is the inverse of the distribution', () => {
	fc.assert(
		fc.property(fc.double({ min: 1e-300, max: 0.5, noNaN: true }), (probability) => {
			expect(normalLowerTail(normalQuantile(probability)) / probability).toBeCloseTo(1, 11);
		})
	);
});

it.each([0, 1, -0.1, NaN])('refuses %f', (probability) => {
	expect(() => normalQuantile(probability)).toThrow(OutsideDomainError);
});
