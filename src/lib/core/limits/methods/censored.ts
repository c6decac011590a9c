import { censoredSums } from '../../distributions/censoredSums';
import type { Distribution } from '../../distributions/summary';
import { limitMessages } from '../../messages/limits';
import {
	censoredFitOfSums,
	censoredMaximumOfSums,
	censoredMinimumOfSums
} from '../../stats/censoredNormal';
import { OutsideDomainError, SampleTooSmallError } from '../../stats/errors';
import type { Side } from '../allowance';
import type { Margin, MethodOutcome } from './method';
import type { SidePromise } from './promise';

/**
 * Limits of one normal population of which some readings only say "at most the floor" or "at least
 * the clamp": each counts for what it says in the likelihood, none as a value. Each limit on its
 * own only.
 *
 * Source: profile likelihood of the quantile, calibrated to be exact without censoring; Cohen 1959.
 */
export function censoredNormal(
	distribution: Distribution,
	sides: readonly Side[],
	promise: SidePromise
): MethodOutcome {
	if (promise.isBetween) {
		return { status: 'refused', message: limitMessages.bothTailsNeedNumbers() };
	}
	try {
		return {
			status: 'supported',
			limits: Object.fromEntries(
				sides.map((side) => [side, marginOn(distribution, side, promise)])
			),
			isPooled: true,
			warnings: []
		};
	} catch (error) {
		if (error instanceof SampleTooSmallError || error instanceof OutsideDomainError) {
			return { status: 'refused', message: limitMessages.censoredNeedReadings() };
		}
		throw error;
	}
}

function marginOn(distribution: Distribution, side: Side, promise: SidePromise): Margin {
	const sums = censoredSums(distribution);
	const { mean, standardDeviation } = censoredFitOfSums(sums);
	const limit =
		side === 'minimum'
			? censoredMinimumOfSums(sums, promise)
			: censoredMaximumOfSums(sums, promise);
	const n = distribution.sampleSize;
	const observed = sums.observed.sampleSize;
	return {
		kind: 'margin',
		centre: {
			value: mean,
			name: 'Mean',
			method: `Maximum likelihood of ${n} devices, ${n - observed} of them censored.`
		},
		deviation: {
			value: standardDeviation,
			name: 'Spread',
			method: `Maximum likelihood, together with the mean; ${observed} devices carry numbers.`
		},
		components: [],
		factor: Math.abs(limit - mean) / standardDeviation,
		symbol: 'of the likelihood',
		method: `${promise.text} Profile likelihood of the quantile, followed outwards as far as in an uncensored sample of ${observed} devices at its exact factor.`
	};
}
