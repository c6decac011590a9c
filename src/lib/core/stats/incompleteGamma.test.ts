import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { incompleteGamma } from './incompleteGamma';

it('is an exponential tail for shape one', () => {
	expect(incompleteGamma(1, 3).upper / Math.exp(-3)).toBeCloseTo(1, 14);
	expect(incompleteGamma(1, 0.5).lower / -Math.expm1(-0.5)).toBeCloseTo(1, 14);
});

it('is certain at the ends', () => {
	expect(incompleteGamma(2, 0)).toEqual({ lower: 0, upper: 1 });
	expect(incompleteGamma(2, Infinity)).toEqual({ lower: 1, upper: 0 });
});

it('refuses a shape or a point outside of its domain', () => {
	expect(() => incompleteGamma(0, 1)).toThrow(OutsideDomainError);
	expect(() => incompleteGamma(1, -1)).toThrow(OutsideDomainError);
});
