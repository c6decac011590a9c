import { limitMessages } from '../../messages/limits';
import {
	largestDiscard,
	orderStatisticConfidence,
	ranksBetween,
	requiredSampleSize
} from '../../stats/orderStatistics';
import type { Distribution } from '../../distributions/summary';
import type { Side } from '../allowance';
import { percent } from '../digits';
import type { MethodInput, MethodOutcome, Ranked } from './method';
import { promiseOf, type SidePromise } from './promise';

/**
 * Limits at measured devices, whatever the shape of the distribution: the r-th device from outside,
 * r the largest whose exact binomial confidence reaches γ. Lots are pooled.
 *
 * The outermost devices are stored with the distribution. Where r lies deeper than what is stored,
 * the deepest stored device is taken: it is further out, so the promise holds with more confidence.
 *
 * Sources: Wilks 1941; ISO 16269-6.
 */
export function orderMethod({ distribution, rules, sides }: MethodInput): MethodOutcome {
	const { sampleSize, extremes } = distribution;
	if (extremes.lowest.length === 0) {
		return { status: 'refused', message: limitMessages.orderNeedsDevices() };
	}
	const promise = promiseOf(rules, sides);
	const ranks = ranksOf(sampleSize, promise);
	if (ranks === undefined) {
		const required = requiredSampleSize(promise, promise.isBetween ? 2 : 1);
		return {
			status: 'refused',
			message: limitMessages.orderNeedsMore(required, sampleSize, sides.length),
			requiredSampleSize: required
		};
	}
	const censored = sides.find((side) => isCensored(distribution, side, ranks[side]));
	if (censored !== undefined) {
		return { status: 'refused', message: limitMessages.rankCensored(censored, ranks[censored]) };
	}
	return {
		status: 'supported',
		limits: Object.fromEntries(
			sides.map((side) => [side, rankedOn(distribution, side, { promise, rank: ranks[side] })])
		),
		isPooled: true,
		warnings: []
	};
}

/** Ranks from outside, the outermost device being 1; `undefined` when the sample is too small. */
function ranksOf(sampleSize: number, promise: SidePromise): Record<Side, number> | undefined {
	if (promise.isBetween) {
		const ranks = ranksBetween(sampleSize, promise);
		return ranks && { minimum: ranks.minimum, maximum: sampleSize + 1 - ranks.maximum };
	}
	const rank = largestDiscard(sampleSize, promise);
	return rank === 0 ? undefined : { minimum: rank, maximum: rank };
}

/** Whether that device only says "at most the floor" or "at least the clamp". */
function isCensored({ censoring }: Distribution, side: Side, rank: number): boolean {
	if (censoring === undefined) return false;
	return rank <= (side === 'minimum' ? censoring.atOrBelow : censoring.atOrAbove);
}

function rankedOn(
	{ extremes, sampleSize }: Distribution,
	side: Side,
	{ promise, rank: allowed }: { readonly promise: SidePromise; readonly rank: number }
): Ranked {
	const stored = side === 'minimum' ? extremes.lowest : extremes.highest;
	const rank = Math.min(allowed, stored.length);
	const confidence = orderStatisticConfidence(sampleSize, {
		discarded: rank,
		content: promise.content
	});
	const reached = promise.isBetween ? '' : ` Confidence reached: ${percent(confidence)}.`;
	return {
		kind: 'ranked',
		value: stored[rank - 1] ?? Number.NaN,
		rank,
		method: `${promise.text} Order statistic of ${sampleSize} devices, exact binomial, any shape of the distribution: Wilks 1941, ISO 16269-6.${reached}`
	};
}
