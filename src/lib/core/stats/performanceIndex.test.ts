import { expect, it } from 'vitest';
import { OutsideDomainError, SampleTooSmallError } from './errors';
import {
	oneSidedIndexLowerBound,
	performanceIndex,
	performanceIndexLowerBound
} from './performanceIndex';
import { oneSidedToleranceFactor } from './toleranceFactor';

const MOMENTS = { sampleSize: 50, mean: 16, standardDeviation: 2 };

// NIST/SEMATECH e-Handbook 6.1.6: mean 16, deviation 2, limits 8 and 20
it('takes the nearer limit', () => {
	expect(performanceIndex(MOMENTS, { minimum: 8, maximum: 20 })).toBeCloseTo(2 / 3, 14);
	expect(performanceIndex(MOMENTS, { minimum: 8 })).toBeCloseTo(4 / 3, 14);
	expect(() => performanceIndex(MOMENTS, {})).toThrow(OutsideDomainError);
	expect(() => performanceIndex({ ...MOMENTS, standardDeviation: 0 }, { minimum: 8 })).toThrow(
		'a spread, got 0'
	);
});

// SciPy 1.10.1: the formula of Bissell, and the noncentral t inverted
it('has a lower bound, approximate and exact', () => {
	const sample = { sampleSize: 30, confidence: 0.95 };
	expect(performanceIndexLowerBound(1, sample)).toBeCloseTo(0.7619499375, 9);
	expect(oneSidedIndexLowerBound(1, sample)).toBeCloseTo(0.75837203, 7);
});

// A limit at mean + k₁s has an index of k₁/3, whose bound is exactly the content it promises
it('is the tolerance factor seen from the other side', () => {
	const promise = { content: 0.99865, confidence: 0.95 };
	const index = oneSidedToleranceFactor(40, promise) / 3;
	const bound = oneSidedIndexLowerBound(index, { sampleSize: 40, confidence: 0.95 });
	expect(3 * bound).toBeCloseTo(2.9999769927, 7);
});

it('refuses one device, a certainty, and an index without meaning', () => {
	const one = { sampleSize: 1, confidence: 0.95 };
	expect(() => performanceIndexLowerBound(1, one)).toThrow(SampleTooSmallError);
	expect(() => oneSidedIndexLowerBound(1, one)).toThrow(SampleTooSmallError);
	expect(() => performanceIndexLowerBound(-1, { sampleSize: 9, confidence: 0.9 })).toThrow(
		'a positive index'
	);
	expect(() => oneSidedIndexLowerBound(1, { sampleSize: 9, confidence: 1 })).toThrow(
		OutsideDomainError
	);
});
