import { SampleTooSmallError, TooFewLotsError } from './errors';
import type { GroupSums } from './varianceComponents';

/**
 * One stratum of the spread: a variance estimate, its degrees of freedom, and its share in the total
 * variance of a single device of a future lot.
 */
export interface Stratum {
	readonly variance: number;
	readonly degrees: number;
	readonly share: number;
}

/**
 * What a limit for future lots rests on. The first stratum is the variance of lot means (share 1);
 * the mean itself has this variance divided by the number of lots.
 */
export interface LotStrata {
	/** Mean of the lot means, each lot counting once, however many devices it gave. */
	readonly mean: number;
	readonly lots: number;
	/** Harmonic mean of devices a lot (one-way), of devices a wafer (nested). */
	readonly effectiveSize: number;
	readonly strata: readonly Stratum[];
}

const average = (values: readonly number[]) =>
	values.reduce((sum, value) => sum + value, 0) / values.length;

const squaresAbout = (values: readonly number[], centre: number) =>
	values.reduce((sum, value) => sum + (value - centre) ** 2, 0);

/**
 * Strata of lots and devices, by unweighted lot means: their variance estimates σ_L² + σ_E²/ñ with
 * the harmonic mean ñ of the lot sizes, so the total is that plus (1 − 1/ñ)·MS within. Exact when
 * balanced, the usual approximation otherwise.
 *
 * Source: Thomas and Hultquist 1978; Krishnamoorthy and Mathew 2009, section 4.4.
 *
 * @throws {TooFewLotsError} for fewer than two lots
 * @throws {SampleTooSmallError} when no lot has two devices
 */
export function oneWayStrata(lots: readonly GroupSums[]): LotStrata {
	if (lots.length < 2) throw new TooFewLotsError('oneWayStrata', 2, lots.length);
	const devices = lots.reduce((sum, lot) => sum + lot.sampleSize, 0);
	const degrees = devices - lots.length;
	if (degrees < 1) throw new SampleTooSmallError('oneWayStrata', lots.length + 1, devices);
	const means = lots.map((lot) => lot.mean);
	const mean = average(means);
	const inverseSize = average(lots.map((lot) => 1 / lot.sampleSize));
	const within = lots.reduce((sum, lot) => sum + lot.sumOfSquares, 0);
	return {
		mean,
		lots: lots.length,
		effectiveSize: 1 / inverseSize,
		strata: [
			{
				variance: squaresAbout(means, mean) / (lots.length - 1),
				degrees: lots.length - 1,
				share: 1
			},
			{ variance: within / degrees, degrees, share: 1 - inverseSize }
		]
	};
}

/**
 * Strata of lots, wafers and devices, by unweighted means at both levels: a lot mean is the mean of
 * its wafer means. With b̃ wafers a lot and h the mean inverse of devices a wafer,
 * σ_T² = V_L + (1 − 1/b̃)·V_W + (1 − 1/q − h(1 − 1/b̃))·MS_E, which is the balanced formula when
 * all sizes are alike.
 *
 * Source: the unweighted-means method of Thomas and Hultquist 1978 taken one level further.
 *
 * @throws {TooFewLotsError} for fewer than two lots
 * @throws {SampleTooSmallError} when no lot has two wafers, or no wafer two devices
 */
export function nestedStrata(lots: readonly (readonly GroupSums[])[]): LotStrata {
	if (lots.length < 2) throw new TooFewLotsError('nestedStrata', 2, lots.length);
	const wafers = lots.flat();
	const devices = wafers.reduce((sum, wafer) => sum + wafer.sampleSize, 0);
	const waferDegrees = wafers.length - lots.length;
	const deviceDegrees = devices - wafers.length;
	if (waferDegrees < 1)
		throw new SampleTooSmallError('nestedStrata wafers', lots.length + 1, wafers.length);
	if (deviceDegrees < 1) throw new SampleTooSmallError('nestedStrata', wafers.length + 1, devices);

	const lotMeans = lots.map((lot) => average(lot.map((wafer) => wafer.mean)));
	const mean = average(lotMeans);
	const betweenWafers = lots.reduce(
		(sum, lot, i) =>
			sum +
			squaresAbout(
				lot.map((wafer) => wafer.mean),
				lotMeans[i]!
			),
		0
	);
	const inverseSizes = (lot: readonly GroupSums[]) => average(lot.map((w) => 1 / w.sampleSize));
	/** 1/b̃: how much of the wafer variance is left in a lot mean. */
	const inverseWafers = average(lots.map((lot) => 1 / lot.length));
	/** 1/q: how much of the device variance is left in a lot mean. */
	const inverseLot = average(lots.map((lot) => inverseSizes(lot) / lot.length));
	/** h: how much of the device variance is left in the spread of wafer means. */
	const inverseWafer =
		lots.reduce((sum, lot) => sum + (lot.length - 1) * inverseSizes(lot), 0) / waferDegrees;
	const within = wafers.reduce((sum, wafer) => sum + wafer.sumOfSquares, 0);
	return {
		mean,
		lots: lots.length,
		effectiveSize: 1 / inverseWafer,
		strata: [
			{
				variance: squaresAbout(lotMeans, mean) / (lots.length - 1),
				degrees: lots.length - 1,
				share: 1
			},
			{ variance: betweenWafers / waferDegrees, degrees: waferDegrees, share: 1 - inverseWafers },
			{
				variance: within / deviceDegrees,
				degrees: deviceDegrees,
				share: 1 - inverseLot - inverseWafer * (1 - inverseWafers)
			}
		]
	};
}
