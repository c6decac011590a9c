import type { CensoredSums } from '../stats/censoredNormal';
import type { DistributionSummary } from './summary';
import { TRANSFORMS } from './transforms';

/**
 * What a censored likelihood needs of a stored distribution, in transformed values: the sums of the
 * observed devices, and how many lie beyond which bound. Without censored devices the observed ones
 * are all.
 */
export function censoredSums(
	of: Pick<
		DistributionSummary,
		'sampleSize' | 'mean' | 'standardDeviation' | 'transform' | 'censoring'
	>
): CensoredSums {
	const { atOrBelow = 0, floor = null, atOrAbove = 0, ceiling = null } = of.censoring ?? {};
	const { apply } = TRANSFORMS[of.transform];
	const observed = of.sampleSize - atOrBelow - atOrAbove;
	return {
		observed: {
			sampleSize: observed,
			mean: of.mean,
			sumOfSquares: of.standardDeviation ** 2 * Math.max(0, observed - 1)
		},
		atMost: floor === null ? [] : [{ count: atOrBelow, bound: apply(floor) }],
		atLeast: ceiling === null ? [] : [{ count: atOrAbove, bound: apply(ceiling) }]
	};
}
