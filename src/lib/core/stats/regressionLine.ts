import { OutsideDomainError, SampleTooSmallError } from './errors';
import { mean } from './mean';

/** A least-squares line y = intercept + slope·x and what is needed to predict from it. */
export interface RegressionLine {
	readonly sampleSize: number;
	readonly intercept: number;
	readonly slope: number;
	/** √(SS residual / (n − 2)). */
	readonly residualDeviation: number;
	readonly meanX: number;
	/** Σ (x − mean)². */
	readonly sumOfSquaresX: number;
	/** Pearson's correlation. */
	readonly correlation: number;
}

/**
 * The least-squares line through pairs.
 *
 * @throws {SampleTooSmallError} for fewer than three pairs
 * @throws {OutsideDomainError} when the lengths differ or x does not vary
 */
export function regressionLine(x: ArrayLike<number>, y: ArrayLike<number>): RegressionLine {
	const count = x.length;
	if (y.length !== count)
		throw new OutsideDomainError('regressionLine', `${count} values of y`, y.length);
	if (count < 3) throw new SampleTooSmallError('regressionLine', 3, count);
	const meanX = mean(x);
	const meanY = mean(y);
	let [xx, xy, yy] = [0, 0, 0];
	for (let i = 0; i < count; i++) {
		const dx = x[i]! - meanX;
		const dy = y[i]! - meanY;
		xx += dx * dx;
		xy += dx * dy;
		yy += dy * dy;
	}
	if (!(xx > 0)) throw new OutsideDomainError('regressionLine', 'a spread of x', xx);
	const slope = xy / xx;
	let residual = 0;
	for (let i = 0; i < count; i++) residual += (y[i]! - meanY - slope * (x[i]! - meanX)) ** 2;
	return {
		sampleSize: count,
		intercept: meanY - slope * meanX,
		slope,
		residualDeviation: Math.sqrt(residual / (count - 2)),
		meanX,
		sumOfSquaresX: xx,
		correlation: yy > 0 ? xy / Math.sqrt(xx * yy) : 0
	};
}

/** What a summary of pairs says of them. */
export interface PairMoments {
	readonly sampleSize: number;
	readonly meanX: number;
	readonly meanY: number;
	readonly deviationX: number;
	readonly deviationY: number;
	readonly correlation: number;
}

/**
 * The same line from means, deviations (n − 1) and correlation alone.
 *
 * @throws {SampleTooSmallError} for fewer than three pairs
 * @throws {OutsideDomainError} without a spread of x, or for a correlation beyond ±1
 */
export function lineFromMoments(moments: PairMoments): RegressionLine {
	const { sampleSize, meanX, meanY, deviationX, deviationY, correlation } = moments;
	if (sampleSize < 3) throw new SampleTooSmallError('lineFromMoments', 3, sampleSize);
	if (!(deviationX > 0))
		throw new OutsideDomainError('lineFromMoments', 'a spread of x', deviationX);
	if (!(Math.abs(correlation) <= 1))
		throw new OutsideDomainError('lineFromMoments', 'a correlation from −1 to 1', correlation);
	const slope = (correlation * deviationY) / deviationX;
	const residual = deviationY ** 2 * (1 - correlation ** 2) * (sampleSize - 1);
	return {
		sampleSize,
		intercept: meanY - slope * meanX,
		slope,
		residualDeviation: Math.sqrt(residual / (sampleSize - 2)),
		meanX,
		sumOfSquaresX: deviationX ** 2 * (sampleSize - 1),
		correlation
	};
}
