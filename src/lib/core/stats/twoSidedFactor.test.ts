import fc from 'fast-check';
import { expect, it } from 'vitest';
import { OutsideDomainError, SampleTooSmallError } from './errors';
import { oneSidedToleranceFactor } from './toleranceFactor';
import { twoSidedFactor, twoSidedToleranceFactor } from './twoSidedFactor';

const PROMISE = { content: 0.95, confidence: 0.95 };

// Odeh and Owen 1980, table 3, from memory; digits beyond three by an independent integration
it('matches the printed tables for 2 and for 30 devices', () => {
	expect(twoSidedToleranceFactor(2, PROMISE)).toBeCloseTo(36.5192146, 6);
	expect(twoSidedToleranceFactor(30, PROMISE)).toBeCloseTo(2.55489281328, 9);
});

it('serves a point on a fitted line by its variance and degrees', () => {
	const sample = { centreVariance: 1 / 30, degrees: 29 };
	expect(twoSidedFactor(sample, PROMISE)).toBeCloseTo(2.55489281328, 9);
});

it('lies above the one-sided factor, and shrinks with devices', () => {
	const promise = fc.record({
		content: fc.double({ min: 0.6, max: 0.999, noNaN: true }),
		confidence: fc.double({ min: 0.6, max: 0.999, noNaN: true })
	});
	fc.assert(
		fc.property(fc.integer({ min: 2, max: 500 }), promise, (devices, wanted) => {
			const factor = twoSidedToleranceFactor(devices, wanted);
			expect(factor).toBeGreaterThan(oneSidedToleranceFactor(devices, wanted));
			expect(factor).toBeGreaterThan(twoSidedToleranceFactor(devices + 1, wanted));
		}),
		{ numRuns: 25 }
	);
});

it('refuses one device and a certainty', () => {
	expect(() => twoSidedToleranceFactor(1, PROMISE)).toThrow(SampleTooSmallError);
	expect(() => twoSidedToleranceFactor(9, { content: 0.9, confidence: 1 })).toThrow(
		OutsideDomainError
	);
});
