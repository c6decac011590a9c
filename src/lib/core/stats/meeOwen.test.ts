import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { lotsToleranceHalfWidth, lotsToleranceMargin } from './lotsToleranceMargin';
import { meeOwenBasis, meeOwenHalfWidth, meeOwenMargin } from './meeOwen';

/** Five batches of five: SSB = 4163.36, SSW = 1578.4 (Krishnamoorthy and Mathew 2009, example 4.1). */
const BATCHES = {
	mean: 388.36,
	lots: 5,
	effectiveSize: 5,
	strata: [
		{ variance: 4163.36 / 4 / 5, degrees: 4, share: 1 },
		{ variance: 1578.4 / 20, degrees: 20, share: 0.8 }
	]
};

// SciPy 1.10.1: the formulas of Mee and Owen 1983 and Mee 1984
it('has the published formulas’ numbers for five batches', () => {
	const basis = meeOwenBasis(BATCHES, 0.95);
	expect(basis.varianceRatio).toBeCloseTo(10.2653585, 6);
	expect(basis.degrees).toBeCloseTo(4.62950484, 7);
	expect(basis.effectiveSampleSize).toBeCloseTo(5.38221337, 7);
	expect(basis.deviation).toBeCloseTo(16.47130839, 7);
	const promise = { content: 0.95, confidence: 0.95 };
	expect(388.36 - meeOwenMargin(BATCHES, promise)).toBeCloseTo(324.564841, 5);
	expect(meeOwenHalfWidth(BATCHES, promise)).toBeCloseTo(76.3289277, 6);
});

it.each([0.9, 0.95, 0.975, 0.99])('is a second route at confidence %f', (confidence) => {
	const promise = { content: 0.99, confidence };
	const margin = lotsToleranceMargin(BATCHES, promise);
	expect(Math.abs(meeOwenMargin(BATCHES, promise) / margin - 1)).toBeLessThan(0.06);
	const halfWidth = lotsToleranceHalfWidth(BATCHES, promise);
	expect(Math.abs(meeOwenHalfWidth(BATCHES, promise) / halfWidth - 1)).toBeLessThan(0.06);
});

it('refuses wafers, for which it is not made', () => {
	const nested = {
		...BATCHES,
		strata: [...BATCHES.strata, { variance: 1, degrees: 9, share: 0.5 }]
	};
	expect(() => meeOwenBasis(nested, 0.95)).toThrow(OutsideDomainError);
});
