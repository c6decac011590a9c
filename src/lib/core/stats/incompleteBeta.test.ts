import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { incompleteBeta } from './incompleteBeta';

// mpmath 1.3.0, 25 digits: betainc(a, b, 0, x, regularized=True)
it.each([
	[2, 3, 0.25, 0.26171875],
	[0.5, 0.5, 0.1, 0.2048327646991335],
	[50, 0.5, 0.99, 0.3173043978741976],
	[3, 200, 0.1, 0.9999998433772438],
	[400, 600, 0.41, 0.7414814534942459]
])('matches mpmath for a = %f, b = %f at %f', (a, b, x, value) => {
	const { lower, upper } = incompleteBeta(a, b, x);
	expect(lower).toBeCloseTo(value, 13);
	expect(upper).toBeCloseTo(1 - value, 13);
});

it('is certain at the ends', () => {
	expect(incompleteBeta(2, 3, 0)).toEqual({ lower: 0, upper: 1 });
	expect(incompleteBeta(2, 3, 1)).toEqual({ lower: 1, upper: 0 });
});

it('refuses what lies outside of its domain', () => {
	expect(() => incompleteBeta(0, 1, 0.5)).toThrow(OutsideDomainError);
	expect(() => incompleteBeta(1, -1, 0.5)).toThrow(OutsideDomainError);
	expect(() => incompleteBeta(1, 1, 1.5)).toThrow(OutsideDomainError);
});
