import { expect, it } from 'vitest';
import {
	chiSquareDensity,
	chiSquareLowerTail,
	chiSquareQuantile,
	chiSquareUpperTail
} from './chiSquare';
import { OutsideDomainError } from './errors';

// mpmath 1.3.0: gammainc(d/2, x/2, inf, regularized=True)
it.each([
	[3, 1, 0.0832645166635504],
	[20, 4.5, 0.0008037179125031833],
	[0.001, 3, 0.999991592080942],
	[60, 42, 0.0352846184542286],
	[300, 40, 1.495596972272627e-41],
	[1003000, 1e6, 0.0170167729332663]
])('has the upper tail of mpmath at %f for %f degrees', (x, degrees, tail) => {
	expect(chiSquareUpperTail(x, degrees) / tail).toBeCloseTo(1, 12);
});

// mpmath 1.3.0: gammainc(d/2, 0, x/2, regularized=True)
it.each([
	[0.001, 3, 8.40791905804616e-6],
	[10, 42, 8.10925045988817e-8],
	[995000, 1e6, 1.9932785963575e-4]
])('has the lower tail of mpmath at %f for %f degrees', (x, degrees, tail) => {
	expect(chiSquareLowerTail(x, degrees) / tail).toBeCloseTo(1, 12);
});

it('has nothing below zero', () => {
	expect(chiSquareLowerTail(-1, 3)).toBe(0);
	expect(chiSquareUpperTail(-1, 3)).toBe(1);
	expect(chiSquareDensity(-1, 3)).toBe(0);
});

// SciPy 1.17.1: stats.chi2.pdf
it.each([
	[3, 1, 0.05139344326792309],
	[20, 4.5, 0.0003562821698197927],
	[40, 42, 0.04441765869604248]
])('has the density of SciPy at %f for %f degrees', (x, degrees, density) => {
	expect(chiSquareDensity(x, degrees) / density).toBeCloseTo(1, 12);
});

// SciPy 1.17.1: stats.chi2.ppf
it.each([
	[0.05, 1, 0.003932140000019522],
	[0.95, 2, 5.991464547107979],
	[0.01, 42, 23.65009467782619],
	[1e-6, 3, 0.00024181048720124264],
	[0.99, 1e6, 1003292.8936864126],
	[0.05, 0.7, 0.0002759625506983099]
])('has the quantile of SciPy at %f for %f degrees', (probability, degrees, quantile) => {
	expect(chiSquareQuantile(probability, degrees) / quantile).toBeCloseTo(1, 12);
});

it.each([0, 1])('has no quantile of %f', (probability) => {
	expect(() => chiSquareQuantile(probability, 3)).toThrow(OutsideDomainError);
});
