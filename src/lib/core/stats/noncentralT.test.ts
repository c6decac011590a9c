import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { noncentralTLowerTail, noncentralTQuantile } from './noncentralT';
import { studentTLowerTail } from './studentT';

// SciPy 1.17.1: stats.nct.cdf
it.each([
	[3, 9, 1.5, 0.8782479479827304],
	[-1, 4, 0.5, 0.08614956903656282],
	[50, 300, 45, 0.9861447942987666],
	[5, 2.5, 4, 0.562333419281581]
])('matches SciPy at t = %f, %f degrees, noncentrality %f', (t, degrees, noncentrality, value) => {
	expect(noncentralTLowerTail(t, degrees, noncentrality)).toBeCloseTo(value, 12);
});

// SciPy 1.17.1: stats.nct.ppf
it.each([
	[0.95, 9, 7.3566, 12.58946684866606],
	[0.99, 299, 52, 57.97007073954156],
	[0.05, 4, 2, 0.3641343202021331],
	[0.9, 2.5, 3, 8.145170030190124]
])('has the quantile of SciPy at %f, %f degrees, noncentrality %f', (p, degrees, delta, t) => {
	expect(noncentralTQuantile(p, degrees, delta) / t).toBeCloseTo(1, 11);
});

it('is Student’s t without noncentrality', () => {
	expect(noncentralTLowerTail(1.7, 3, 0)).toBeCloseTo(studentTLowerTail(1.7, 3), 13);
	expect(noncentralTLowerTail(0, 3, 0)).toBeCloseTo(0.5, 14);
});

it('has no quantile of a certainty', () => {
	expect(() => noncentralTQuantile(1, 9, 2)).toThrow(OutsideDomainError);
});
