import { limitMessages } from '../../messages/limits';
import { oneSidedToleranceFactor } from '../../stats/toleranceFactor';
import type { LimitPolicy } from '../policy';
import type { MethodInput, MethodOutcome, Side } from './method';

/** A rarer device than one in twenty samples of this size is beyond what the sample can show. */
const SEEN_IN_TWENTY_SAMPLES = 0.05;

/**
 * Limits of one normal population, each on its own: mean ∓ k₁·s with the exact one-sided factor
 * k₁ = t′(γ; n − 1, z_P·√n)/√n, a quantile of the noncentral t distribution. Lots are pooled.
 *
 * When a minimum and a maximum are promised at once, each takes (1 + γ)/2, so that both hold
 * together with confidence γ (Bonferroni).
 *
 * Sources: Odeh and Owen 1980, Tables for Normal Tolerance Limits; ISO 16269-6.
 */
export function normalMethod({ distribution, rules, sides }: MethodInput): MethodOutcome {
	if (rules.tails === 'both') {
		return { status: 'refused', message: limitMessages.bothTailsNotYet() };
	}
	const { sampleSize } = distribution;
	if (sampleSize < 2) {
		return { status: 'refused', message: limitMessages.tooFewDevices(2, sampleSize) };
	}

	const { content } = rules;
	const confidence = confidenceOfEach(rules, sides);
	return {
		status: 'supported',
		margin: {
			factor: oneSidedToleranceFactor(sampleSize, { content, confidence }),
			symbol: 'k₁',
			method: `${promiseText(rules, sides)} Exact one-sided factor for one normal population, t′(${confidence}; ${sampleSize - 1}, z·√${sampleSize})/√${sampleSize} with z the normal quantile of ${content}: noncentral t, Odeh and Owen 1980, ISO 16269-6.`
		},
		warnings:
			sampleSize * (1 - content) < SEEN_IN_TWENTY_SAMPLES
				? [limitMessages.contentBeyondSample(content, sampleSize)]
				: []
	};
}

/** γ of a single limit: shared when both sides are promised. */
export function confidenceOfEach(rules: LimitPolicy, sides: readonly Side[]): number {
	// Twelve digits keep (1 + 0.9)/2 from printing as 0.9499999999999999.
	return sides.length === 2
		? Number(((1 + rules.confidence) / 2).toPrecision(12))
		: rules.confidence;
}

function promiseText(rules: LimitPolicy, sides: readonly Side[]): string {
	const promise = `Content ${rules.content}, each limit on its own; confidence ${rules.confidence}`;
	return sides.length === 2
		? `${promise} shared by min and max, so ${confidenceOfEach(rules, sides)} each.`
		: `${promise}.`;
}
