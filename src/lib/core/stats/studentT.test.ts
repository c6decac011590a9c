import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { studentTLowerTail, studentTQuantile, studentTUpperTail } from './studentT';

// SciPy 1.17.1: stats.t.sf
it.each([
	[2, 1, 0.14758361765043326],
	[2.5, 9, 0.016930913841492867],
	[-1.3, 4.2, 0.8698212290621731],
	[8, 30, 3.1329112378503795e-9],
	[0, 5, 0.5]
])('has the upper tail of SciPy at %f for %f degrees', (x, degrees, tail) => {
	expect(studentTUpperTail(x, degrees) / tail).toBeCloseTo(1, 12);
	expect(studentTLowerTail(-x, degrees) / tail).toBeCloseTo(1, 12);
});

// SciPy 1.17.1: stats.t.ppf
it.each([
	[0.975, 9, 2.262157162798205],
	[0.05, 2, -2.9199855803537256],
	[0.999, 1, 318.30883898555015],
	[0.9, 2.5, 1.7302509288071766],
	[0.99, 1e5, 2.326385165355268]
])('has the quantile of SciPy at %f for %f degrees', (probability, degrees, quantile) => {
	expect(studentTQuantile(probability, degrees) / quantile).toBeCloseTo(1, 12);
});

it('has its median at zero, and no quantile of a certainty', () => {
	expect(studentTQuantile(0.5, 3)).toBe(0);
	expect(() => studentTQuantile(1, 3)).toThrow(OutsideDomainError);
});
