import { SampleTooSmallError } from './errors';
import { mean } from './mean';

/** Σ (y − mean)² about the sample's own mean. */
export function sumOfSquares(values: ArrayLike<number>): number {
	const centre = mean(values);
	let [squares, rest] = [0, 0];
	for (let i = 0; i < values.length; i++) {
		const deviation = values[i]! - centre;
		squares += deviation * deviation;
		rest += deviation;
	}
	return squares - (rest * rest) / values.length;
}

/**
 * Spread of a sample around its own mean; the squared deviations are divided by n − 1, because the
 * mean was estimated from the same devices.
 *
 * @throws {SampleTooSmallError} for fewer than two devices
 * @example standardDeviation([0.512, 0.498, 0.507, 0.515, 0.503]) // 0.00682
 */
export function standardDeviation(values: ArrayLike<number>): number {
	if (values.length < 2) throw new SampleTooSmallError('standardDeviation', 2, values.length);
	return Math.sqrt(sumOfSquares(values) / (values.length - 1));
}
