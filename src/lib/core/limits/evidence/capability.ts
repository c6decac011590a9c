import type { Distribution } from '../../distributions/summary';
import { TRANSFORMS } from '../../distributions/transforms';
import {
	oneSidedIndexLowerBound,
	performanceIndex,
	performanceIndexLowerBound,
	type SpecificationLimits
} from '../../stats/performanceIndex';
import { CAPABILITY_WORDS, type CapabilityWord } from './capabilityWord';

/** How well the measured devices keep a printed limit. */
export interface Capability {
	/** Ppk, from the overall deviation of the transformed values. */
	readonly index: number;
	/** Its lower bound at the confidence asked for; `null` where Ppk isn't positive. */
	readonly lowerBound: number | null;
	readonly word: CapabilityWord;
	/** The limit came from these same devices, so that the index says little. */
	readonly isCircular: boolean;
}

/**
 * Ppk of stored devices against printed limits, in the transformed values limits are made in, with
 * its lower confidence bound: exact for one limit, Bissell's for two.
 *
 * @param limits in SI; a bound that is missing is not promised
 * @returns `undefined` without spread, without a limit, or with censored readings
 */
export function capability(
	distribution: Distribution,
	limits: SpecificationLimits,
	{ confidence, isCircular }: { readonly confidence: number; readonly isCircular: boolean }
): Capability | undefined {
	const { sampleSize, standardDeviation, transform, censoring } = distribution;
	const { minimum, maximum } = limits;
	if (!(standardDeviation > 0) || sampleSize < 2 || censoring !== undefined) return undefined;
	if (minimum === undefined && maximum === undefined) return undefined;

	const { apply } = TRANSFORMS[transform];
	const index = performanceIndex(distribution, {
		...(minimum === undefined ? {} : { minimum: apply(minimum) }),
		...(maximum === undefined ? {} : { maximum: apply(maximum) })
	});
	const isOneSided = minimum === undefined || maximum === undefined;
	const bound = isOneSided
		? oneSidedIndexLowerBound(index, { sampleSize, confidence })
		: index > 0
			? performanceIndexLowerBound(index, { sampleSize, confidence })
			: null;
	return { index, lowerBound: bound, word: wordOf(bound ?? index), isCircular };
}

function wordOf(bound: number): CapabilityWord {
	return CAPABILITY_WORDS.find(({ from }) => bound >= from)?.word ?? 'not capable';
}
