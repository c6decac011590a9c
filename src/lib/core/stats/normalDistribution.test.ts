import { expect, it } from 'vitest';
import {
	normalBetween,
	normalDensity,
	normalLowerTail,
	normalUpperTail
} from './normalDistribution';

// mpmath 1.3.0, 30 digits: erfc(x/sqrt(2))/2
it.each([
	[0, 0.5],
	[0.5, 0.3085375387259869],
	[1, 0.15865525393145705],
	[2.5, 0.006209665325776135],
	[4, 3.1671241833119924e-5],
	[8, 6.220960574271784e-16],
	[20, 2.7536241186062337e-89],
	[37, 5.725571222524577e-300]
])('has the upper tail of mpmath at %f', (x, tail) => {
	expect(normalUpperTail(x) / tail).toBeCloseTo(1, 14);
	expect(normalLowerTail(-x) / tail).toBeCloseTo(1, 14);
	expect(normalLowerTail(x)).toBeCloseTo(1 - tail, 15);
	expect(normalUpperTail(-x)).toBeCloseTo(1 - tail, 15);
});

it('has nothing left beyond 39 deviations', () => {
	expect(normalUpperTail(40)).toBe(0);
	expect(normalLowerTail(40)).toBe(1);
	expect(normalDensity(Infinity)).toBe(0);
	expect(normalUpperTail(-Infinity)).toBe(1);
});

// 1/√(2π), and R: dnorm(3)
it('has the density of R', () => {
	expect(normalDensity(0)).toBeCloseTo(0.3989422804014327, 15);
	expect(normalDensity(-3)).toBeCloseTo(0.004431848411938008, 15);
});

// mpmath: the difference of the two tails above
it('keeps the digits of a probability between two points of one tail', () => {
	expect(normalBetween(4, 8) / 3.167124183249782e-5).toBeCloseTo(1, 14);
	expect(normalBetween(-8, -4) / 3.167124183249782e-5).toBeCloseTo(1, 14);
	expect(normalBetween(-1, 1)).toBeCloseTo(0.6826894921370859, 15);
});
