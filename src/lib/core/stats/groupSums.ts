import type { GroupSums } from './varianceComponents';
import { mean } from './mean';
import { sumOfSquares } from './standardDeviation';

/**
 * The sums of a group from its values: all that components and limits need of it.
 *
 * @throws {SampleTooSmallError} for no values
 */
export function groupSums(values: ArrayLike<number>): GroupSums {
	return {
		sampleSize: values.length,
		mean: mean(values),
		sumOfSquares: values.length > 1 ? sumOfSquares(values) : 0
	};
}
