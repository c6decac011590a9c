import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { fQuantile, fUpperTail } from './fDistribution';

// SciPy 1.17.1: stats.f.sf
it.each([
	[19.95, 2, 72, 1.2766938211041883e-7],
	[1, 5, 5, 0.5],
	[0.2, 3, 10, 0.8940181114207209],
	[4, 2, 1000, 0.018609467459012565]
])('has the p-value of SciPy at %f for %i and %i degrees', (x, numerator, denominator, tail) => {
	expect(fUpperTail(x, { numerator, denominator }) / tail).toBeCloseTo(1, 12);
});

// SciPy 1.17.1: stats.f.ppf
it.each([
	[0.95, 2, 72, 3.123907448545777],
	[0.15, 4, 20, 0.33665478454615133],
	[0.85, 8, 2, 6.028975810092364],
	[0.01, 3, 7, 0.03613800894092479]
])('has the quantile of SciPy at %f for %i and %i degrees', (p, numerator, denominator, x) => {
	expect(fQuantile(p, { numerator, denominator }) / x).toBeCloseTo(1, 12);
});

it('has nothing below zero, and no quantile of a certainty', () => {
	expect(fUpperTail(0, { numerator: 2, denominator: 3 })).toBe(1);
	expect(() => fQuantile(0, { numerator: 2, denominator: 3 })).toThrow(OutsideDomainError);
});
