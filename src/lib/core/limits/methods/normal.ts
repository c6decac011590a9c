import { limitMessages } from '../../messages/limits';
import { oneSidedToleranceFactor } from '../../stats/toleranceFactor';
import { twoSidedToleranceFactor } from '../../stats/twoSidedFactor';
import { censoredNormal } from './censored';
import { contentWarning } from './contentWarning';
import type { Margin, MethodInput, MethodOutcome } from './method';
import { pooledMean, totalDeviation } from './moments';
import { promiseOf, type SidePromise } from './promise';

/**
 * Limits of one normal population, lots pooled.
 *
 * Each limit on its own: mean ∓ k₁·s with the exact one-sided factor
 * k₁ = t′(γ; n − 1, z_P·√n)/√n, a quantile of the noncentral t distribution. Both together:
 * mean ∓ k₂·s, k₂ exact by integration over the error of the mean.
 *
 * Sources: Odeh and Owen 1980, Tables for Normal Tolerance Limits; ISO 16269-6.
 */
export function normalMethod({ distribution, rules, sides }: MethodInput): MethodOutcome {
	const { sampleSize } = distribution;
	if (sampleSize < 2) {
		return { status: 'refused', message: limitMessages.tooFewDevices(2, sampleSize) };
	}
	const promise = promiseOf(rules, sides);
	if (distribution.censoring !== undefined) return censoredNormal(distribution, sides, promise);
	const margin: Margin = {
		kind: 'margin',
		centre: pooledMean(distribution),
		deviation: totalDeviation(distribution),
		components: [],
		...factorOf(sampleSize, promise)
	};
	return {
		status: 'supported',
		limits: Object.fromEntries(sides.map((side) => [side, margin])),
		isPooled: true,
		warnings: contentWarning(rules.content, sampleSize)
	};
}

function factorOf(n: number, promise: SidePromise): Pick<Margin, 'factor' | 'symbol' | 'method'> {
	const { isBetween, content, confidence, text } = promise;
	if (isBetween) {
		return {
			factor: twoSidedToleranceFactor(n, { content, confidence }),
			symbol: 'k₂',
			method: `${text} Exact two-sided factor for one normal population of ${n} devices, by integration over the error of the mean: Odeh and Owen 1980, ISO 16269-6.`
		};
	}
	return {
		factor: oneSidedToleranceFactor(n, { content, confidence }),
		symbol: 'k₁',
		method: `${text} Exact one-sided factor for one normal population, t′(${confidence}; ${n - 1}, z·√${n})/√${n} with z the normal quantile of ${content}: noncentral t, Odeh and Owen 1980, ISO 16269-6.`
	};
}
