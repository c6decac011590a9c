import { OutsideDomainError, SampleTooSmallError } from './errors';
import { findRoot } from './findRoot';
import { incompleteBeta } from './incompleteBeta';
import { requireProbability } from './requireProbability';
import type { TolerancePromise } from './toleranceFactor';

/**
 * How sure it is that a sample with `discarded` end blocks left out holds the content, whatever the
 * distribution: P[Bin(n, 1−P) ≥ m], as an incomplete beta function. m counts ranks from below and
 * from above together: the extreme itself is m = 1 on its side, minimum and maximum at once m = 2.
 *
 * Source: Wilks 1941; ISO 16269-6.
 *
 * @throws {OutsideDomainError} unless m is a whole number from 1 to n
 * @example orderStatisticConfidence(300, { discarded: 1, content: 0.99 }) // 0.9509591059
 */
export function orderStatisticConfidence(
	sampleSize: number,
	{ discarded, content }: { readonly discarded: number; readonly content: number }
): number {
	requireProbability('orderStatisticConfidence', 'a content', content);
	if (!(Number.isInteger(discarded) && discarded >= 1 && discarded <= sampleSize))
		throw new OutsideDomainError(
			'orderStatisticConfidence',
			`a rank from 1 to ${sampleSize}`,
			discarded
		);
	return incompleteBeta(discarded, sampleSize - discarded + 1, 1 - content, content).lower;
}

/**
 * The most end blocks that may be left out at the promise: x₍ₘ₎ is then a minimum on its own,
 * x₍ₙ₋ₘ₊₁₎ a maximum. 0 when even the extremes do not reach the confidence.
 */
export function largestDiscard(sampleSize: number, promise: TolerancePromise): number {
	requireProbability('largestDiscard', 'a confidence', promise.confidence);
	const { content } = promise;
	const reaches = (discarded: number) =>
		orderStatisticConfidence(sampleSize, { discarded, content }) >= promise.confidence;
	if (sampleSize < 1 || !reaches(1)) return 0;
	let [enough, tooMany] = [1, sampleSize + 1];
	while (tooMany - enough > 1) {
		const middle = Math.floor((enough + tooMany) / 2);
		if (reaches(middle)) enough = middle;
		else tooMany = middle;
	}
	return enough;
}

/**
 * The fewest devices for which `discarded` end blocks (1 for one limit from the extreme, 2 for both
 * together) reach the promise.
 *
 * @example requiredSampleSize({ content: 0.99, confidence: 0.975 }, 1) // 368
 */
export function requiredSampleSize(promise: TolerancePromise, discarded: number): number {
	requireProbability('requiredSampleSize', 'a confidence', promise.confidence);
	const { content } = promise;
	const reaches = (size: number) =>
		orderStatisticConfidence(size, { discarded, content }) >= promise.confidence;
	let [tooFew, enough] = [discarded - 1, discarded];
	while (!reaches(enough)) [tooFew, enough] = [enough, enough * 2];
	while (enough - tooFew > 1) {
		const middle = Math.floor((tooFew + enough) / 2);
		if (reaches(middle)) enough = middle;
		else tooFew = middle;
	}
	return enough;
}

/** Ranks from below (1 is the smallest) of a minimum, of a maximum, or of both ends. */
export interface OrderRanks {
	readonly minimum: number;
	readonly maximum: number;
}

/**
 * Ranks of limits that promise the content between both: the blocks left out are split evenly, the
 * odd one above. `undefined` when minimum and maximum of the sample do not reach the promise.
 */
export function ranksBetween(
	sampleSize: number,
	promise: TolerancePromise
): OrderRanks | undefined {
	const discarded = largestDiscard(sampleSize, promise);
	if (discarded < 2) return undefined;
	const below = Math.floor(discarded / 2);
	return { minimum: below, maximum: sampleSize + 1 - (discarded - below) };
}

/**
 * Ranks of a minimum and a maximum that each keep the promise on their own side. `undefined` when
 * the sample is too small.
 */
export function ranksEachSide(
	sampleSize: number,
	promise: TolerancePromise
): OrderRanks | undefined {
	const discarded = largestDiscard(sampleSize, promise);
	if (discarded < 1) return undefined;
	return { minimum: discarded, maximum: sampleSize + 1 - discarded };
}

/**
 * The content a sample can speak for at a confidence, with `discarded` end blocks left out: what may
 * be said of 77 devices without a failure.
 *
 * @throws {SampleTooSmallError} when there are no more devices than blocks left out
 * @example demonstratedContent(77, { discarded: 1, confidence: 0.9 }) // 0.9705389895
 */
export function demonstratedContent(
	sampleSize: number,
	{ discarded, confidence }: { readonly discarded: number; readonly confidence: number }
): number {
	requireProbability('demonstratedContent', 'a confidence', confidence);
	if (sampleSize <= discarded)
		throw new SampleTooSmallError('demonstratedContent', discarded + 1, sampleSize);
	const excess = (content: number) =>
		incompleteBeta(discarded, sampleSize - discarded + 1, 1 - content, content).lower - confidence;
	return findRoot(excess, 1e-12, 1 - 1e-15, 1e-15);
}
