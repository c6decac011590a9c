import { componentsOf } from '../distributions/componentsOf';
import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import { poolGroups } from '../stats/varianceComponents';

/**
 * The distribution of some of its lots, from the stored sums alone: what a limit would be without a
 * lot. Quantiles, shape and single devices can't be told from sums; the median becomes the mean
 * turned back, and `order` has nothing to answer from.
 *
 * @param isIn by the name of the wafer lot
 * @returns `undefined` when no lot is left, and where some readings are censored
 */
export function selectLots(
	distribution: Distribution,
	isIn: (waferLot: string) => boolean
): Distribution | undefined {
	const groups = distribution.groups.filter(({ waferLot }) => isIn(waferLot));
	if (groups.length === distribution.groups.length) return distribution;
	if (groups.length === 0 || distribution.censoring !== undefined) return undefined;
	const { sampleSize, mean, sumOfSquares } = poolGroups(groups);
	const { invert } = TRANSFORMS[distribution.transform];
	return {
		...distribution,
		sampleSize,
		independentLots: new Set(groups.map(({ waferLot }) => waferLot)).size,
		wafers: groups.length,
		mean,
		standardDeviation: sampleSize > 1 ? Math.sqrt(sumOfSquares / (sampleSize - 1)) : 0,
		quantiles: [{ probability: 0.5, value: invert(mean) }],
		normality: null,
		components: componentsOf(groups),
		groups,
		extremes: { lowest: [], highest: [] }
	};
}
