import { expect, it } from 'vitest';
import { OutsideDomainError, SampleTooSmallError } from './errors';
import {
	demonstratedContent,
	largestDiscard,
	orderStatisticConfidence,
	ranksBetween,
	ranksEachSide,
	requiredSampleSize
} from './orderStatistics';

const PROMISE = { content: 0.95, confidence: 0.95 };

// Python: sum(comb(60, k) * .05**k * .95**(60 - k) for k in range(2, 61))
it('has the exact binomial confidence', () => {
	expect(orderStatisticConfidence(60, { discarded: 2, content: 0.95 })).toBeCloseTo(
		0.8084466252647761,
		14
	);
	// closed form 1 − 0.99³⁰⁰
	expect(orderStatisticConfidence(300, { discarded: 1, content: 0.99 })).toBeCloseTo(
		1 - 0.99 ** 300,
		14
	);
});

// The sequence 59, 93, 124, 153 of Wilks for 95/95, from memory
it.each([
	[1, 59],
	[2, 93],
	[3, 124],
	[4, 153]
])('needs for %i blocks at 95/95 %i devices', (discarded, devices) => {
	expect(requiredSampleSize(PROMISE, discarded)).toBe(devices);
	expect(largestDiscard(devices, PROMISE)).toBe(discarded);
	expect(largestDiscard(devices - 1, PROMISE)).toBe(discarded - 1);
});

// The worked case of the design: ln 0.025 / ln 0.99 = 367.04
it('needs 368 devices a side for 99 % at a shared 95 %', () => {
	expect(requiredSampleSize({ content: 0.99, confidence: 0.975 }, 1)).toBe(368);
});

it('gives ranks for each side and between both', () => {
	expect(ranksEachSide(93, PROMISE)).toEqual({ minimum: 2, maximum: 92 });
	expect(ranksBetween(93, PROMISE)).toEqual({ minimum: 1, maximum: 93 });
	expect(ranksBetween(124, PROMISE)).toEqual({ minimum: 1, maximum: 123 });
	expect(ranksBetween(92, PROMISE)).toBeUndefined();
	expect(ranksEachSide(58, PROMISE)).toBeUndefined();
	expect(largestDiscard(0, PROMISE)).toBe(0);
});

// SciPy 1.17.1: stats.beta.ppf(0.05, 230, 2); closed form 0.1^(1/77)
it('tells what a sample can speak for', () => {
	expect(demonstratedContent(231, { discarded: 2, confidence: 0.95 })).toBeCloseTo(
		0.9796294587649732,
		12
	);
	expect(demonstratedContent(77, { discarded: 1, confidence: 0.9 })).toBeCloseTo(
		0.1 ** (1 / 77),
		12
	);
	expect(() => demonstratedContent(1, { discarded: 1, confidence: 0.9 })).toThrow(
		SampleTooSmallError
	);
});

it('refuses ranks outside of the sample', () => {
	expect(() => orderStatisticConfidence(5, { discarded: 0, content: 0.9 })).toThrow(
		OutsideDomainError
	);
	expect(() => orderStatisticConfidence(5, { discarded: 6, content: 0.9 })).toThrow(
		'a rank from 1 to 5, got 6'
	);
});
