import type { CurveCovariance } from '../stats/curveSimulator';
import { SampleTooSmallError, TooFewLotsError } from '../stats/errors';
import type { PairMoments } from '../stats/regressionLine';
import type { Transform } from './summary';

/**
 * How the transformed values at the measured biases of one temperature and frequency vary together.
 * Everything else (covariance of lot means, of all devices together) is arithmetic from these.
 */
export interface JointDistribution {
	readonly characteristic: string;
	/** Temperature and frequency, without a bias. */
	readonly conditionKey: string;
	readonly unit: string;
	readonly transform: Transform;
	/** The points of the curve in V, ascending. */
	readonly biases: readonly number[];
	/** Complete devices of each independent lot. */
	readonly lotSizes: readonly number[];
	/** Lots × points, row by row. */
	readonly lotMeans: Float64Array;
	/** Points × points: Σ (y − lot mean)(y − lot mean)ᵀ / (devices − lots); 0 without degrees. */
	readonly withinLots: Float64Array;
}

/** How many devices have a value at every bias. */
export function completeDevices({ lotSizes }: Pick<JointDistribution, 'lotSizes'>): number {
	return lotSizes.reduce((sum, size) => sum + size, 0);
}

/**
 * What a whole-curve limit is simulated from, at some of the biases or at all of them.
 *
 * @returns `undefined` when a bias is none of the curve's points
 * @throws {TooFewLotsError} for fewer than two lots
 * @throws {SampleTooSmallError} when no lot has two devices
 */
export function curveCovariance(
	joint: JointDistribution,
	biases: readonly number[] = joint.biases
): CurveCovariance | undefined {
	const { lotSizes, lotMeans, withinLots } = joint;
	const lots = lotSizes.length;
	const devices = completeDevices(joint);
	if (lots < 2) throw new TooFewLotsError('curveCovariance', 2, lots);
	if (devices <= lots) throw new SampleTooSmallError('curveCovariance', lots + 1, devices);
	const at = positionsOf(joint, biases);
	if (at === undefined) return undefined;

	const width = joint.biases.length;
	const means = at.map((p) => average(lotSizes.map((_, lot) => lotMeans[lot * width + p]!)));
	const ofLotMeans = matrixOf(at.length, (p, q) => {
		const products = lotSizes.map(
			(_, lot) =>
				(lotMeans[lot * width + at[p]!]! - means[p]!) *
				(lotMeans[lot * width + at[q]!]! - means[q]!)
		);
		return sum(products) / (lots - 1);
	});
	return {
		ofLotMeans,
		withinLots: matrixOf(at.length, (p, q) => withinLots[at[p]! * width + at[q]!]!),
		points: at.length,
		lots,
		effectiveSize: 1 / average(lotSizes.map((size) => 1 / size)),
		withinDegrees: devices - lots
	};
}

/**
 * Means, deviations (n − 1) and correlation of all devices together at two biases: what the line of
 * one on the other is made from. Lot effects are in them, as a screen meets them.
 *
 * @returns `undefined` when a bias is none of the curve's points
 */
export function momentsOfPair(
	joint: JointDistribution,
	biasX: number,
	biasY: number
): PairMoments | undefined {
	const at = positionsOf(joint, [biasX, biasY]);
	if (at === undefined) return undefined;
	const [x = 0, y = 0] = at;
	const width = joint.biases.length;
	const sampleSize = completeDevices(joint);
	const { lotSizes, lotMeans, withinLots } = joint;
	const lotMean = (lot: number, p: number) => lotMeans[lot * width + p]!;
	const meanAt = (p: number) =>
		sum(lotSizes.map((size, lot) => size * lotMean(lot, p))) / sampleSize;
	const [meanX, meanY] = [meanAt(x), meanAt(y)];
	const products = (p: number, meanP: number, q: number, meanQ: number) =>
		withinLots[p * width + q]! * (sampleSize - lotSizes.length) +
		sum(lotSizes.map((size, lot) => size * (lotMean(lot, p) - meanP) * (lotMean(lot, q) - meanQ)));
	const xx = products(x, meanX, x, meanX);
	const yy = products(y, meanY, y, meanY);
	const xy = products(x, meanX, y, meanY);
	return {
		sampleSize,
		meanX,
		meanY,
		deviationX: Math.sqrt(xx / (sampleSize - 1)),
		deviationY: Math.sqrt(yy / (sampleSize - 1)),
		// Rounding can leave |r| a bit above 1 where the points lie on the line.
		correlation: xx > 0 && yy > 0 ? Math.max(-1, Math.min(1, xy / Math.sqrt(xx * yy))) : 0
	};
}

function positionsOf(joint: JointDistribution, biases: readonly number[]): number[] | undefined {
	const positions = biases.map((bias) => joint.biases.indexOf(bias));
	return positions.includes(-1) ? undefined : positions;
}

function matrixOf(points: number, entry: (p: number, q: number) => number): Float64Array {
	return Float64Array.from({ length: points * points }, (_, i) =>
		entry(Math.floor(i / points), i % points)
	);
}

function sum(values: readonly number[]): number {
	return values.reduce((total, value) => total + value, 0);
}

function average(values: readonly number[]): number {
	return sum(values) / values.length;
}
