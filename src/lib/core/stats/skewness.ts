import { SampleTooSmallError } from './errors';
import { mean } from './mean';

/**
 * Moment skewness g₁ = m₃ / m₂^1.5, moments divided by n; 0 for a sample without spread.
 *
 * @throws {SampleTooSmallError} for fewer than three devices
 */
export function skewness(values: ArrayLike<number>): number {
	const count = values.length;
	if (count < 3) throw new SampleTooSmallError('skewness', 3, count);
	const centre = mean(values);
	let [second, third] = [0, 0];
	for (let i = 0; i < count; i++) {
		const deviation = values[i]! - centre;
		const square = deviation * deviation;
		second += square;
		third += square * deviation;
	}
	if (second === 0) return 0;
	return third / count / (second / count) ** 1.5;
}
