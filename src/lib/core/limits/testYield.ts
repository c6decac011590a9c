import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import { normalLowerTail } from '../stats/normalDistribution';
import type { TestYield } from './limit';

/** A file's 12.50 pF read into farad isn't the binary 12.50e-12 of a limit. */
const NOISE = 1e-12;

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
	const { sampleSize, mean, standardDeviation, extremes } = distribution;
	const { apply } = TRANSFORMS[distribution.transform];
	const below = (limit: number) =>
		standardDeviation === 0
			? Number(mean < apply(limit))
			: normalLowerTail((apply(limit) - mean) / standardDeviation);
	const failsLow = test.minimum === null ? 0 : below(test.minimum);
	const failsHigh = test.maximum === null ? 0 : 1 - below(test.maximum);

	const low = countBeyond(extremes.lowest, sampleSize, (value) =>
		test.minimum === null ? false : value < test.minimum * (1 - Math.sign(test.minimum) * NOISE)
	);
	const high = countBeyond(extremes.highest, sampleSize, (value) =>
		test.maximum === null ? false : value > test.maximum * (1 + Math.sign(test.maximum) * NOISE)
	);
	return {
		predicted: Math.max(0, 1 - failsLow - failsHigh),
		passed: low === undefined || high === undefined ? null : sampleSize - low - high,
		of: sampleSize
	};
}

/** `undefined` when all stored devices lie beyond, so that deeper ones may too. */
function countBeyond(
	stored: readonly number[],
	sampleSize: number,
	isBeyond: (value: number) => boolean
): number | undefined {
	const inside = stored.findIndex((value) => !isBeyond(value));
	if (inside >= 0) return inside;
	return stored.length === sampleSize && stored.length > 0 ? sampleSize : undefined;
}
