import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import { normalLowerTail } from '../stats/normalDistribution';
import { countBeyond } from './countBeyond';
import type { TestYield } from './limit';

/**
 * How many devices a test passes: predicted from the normal shape of all devices together, and
 * counted among the stored ones where the outermost devices reach that far.
 *
 * @param test limits in SI; `null` where that side is not tested
 */
export function testYield(
	distribution: Distribution,
	test: { readonly minimum: number | null; readonly maximum: number | null }
): TestYield {
	const { sampleSize, mean, standardDeviation } = distribution;
	const { apply } = TRANSFORMS[distribution.transform];
	const below = (limit: number) =>
		standardDeviation === 0
			? Number(mean < apply(limit))
			: normalLowerTail((apply(limit) - mean) / standardDeviation);
	const failsLow = test.minimum === null ? 0 : below(test.minimum);
	const failsHigh = test.maximum === null ? 0 : 1 - below(test.maximum);

	const low = test.minimum === null ? 0 : countBeyond(distribution, 'minimum', test.minimum);
	const high = test.maximum === null ? 0 : countBeyond(distribution, 'maximum', test.maximum);
	return {
		predicted: Math.max(0, 1 - failsLow - failsHigh),
		passed: low === undefined || high === undefined ? null : sampleSize - low - high,
		of: sampleSize
	};
}
