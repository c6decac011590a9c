import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { moverHalfWidth, moverMargin, varianceSumUpperBound } from './moverMargin';

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

// SciPy 1.10.1: the closed forms of Krishnamoorthy and Lian 2012
it('has the closed forms’ numbers for five batches', () => {
	expect(388.36 - moverMargin(BATCHES, { content: 0.9, confidence: 0.95 })).toBeCloseTo(
		339.632124,
		5
	);
	expect(moverHalfWidth(BATCHES, { content: 0.95, confidence: 0.95 })).toBeCloseTo(75.1528576, 6);
});

// Handbook: ν s²/χ² for one variance alone
it('bounds a single variance by its chi-square', () => {
	// R: 8 * 2.5 / qchisq(0.05, 8)
	expect(varianceSumUpperBound([{ variance: 2.5, degrees: 8, share: 1 }], 0.95)).toBeCloseTo(
		7.31893826782,
		9
	);
});

it('refuses no strata', () => {
	const empty = { ...BATCHES, strata: [] };
	expect(() => moverMargin(empty, { content: 0.9, confidence: 0.9 })).toThrow(OutsideDomainError);
	expect(() => moverHalfWidth(empty, { content: 0.9, confidence: 0.9 })).toThrow(
		OutsideDomainError
	);
});
