import { expect, it } from 'vitest';
import { deviance } from './deviance';

// mpmath 1.3.0, 40 digits: x*log(x/m) + m - x
it.each([
	[3, 7, 1.4581064188383892],
	[1e6, 1000001, 4.999996666669167e-7],
	[5, 5.001, 9.99866686664135e-8],
	[0, 2.5, 2.5]
])('keeps its digits for x = %f near m = %f', (x, mean, value) => {
	expect(deviance(x, mean) / value).toBeCloseTo(1, 12);
});

it('is zero at the mean', () => {
	expect(deviance(123.25, 123.25)).toBe(0);
});
