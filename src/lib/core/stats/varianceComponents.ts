import { SampleTooSmallError, TooFewLotsError } from './errors';
import { fUpperTail } from './fDistribution';

/** The sums of the devices of one group. */
export interface GroupSums {
	readonly sampleSize: number;
	readonly mean: number;
	/** Σ (y − mean)² within the group. */
	readonly sumOfSquares: number;
}

/** One line of an analysis of variance. */
export interface MeanSquare {
	readonly sumOfSquares: number;
	readonly degrees: number;
	readonly meanSquare: number;
}

/** A component as estimated, which may be negative, and as shown, which may not. */
export interface Component {
	readonly estimate: number;
	readonly variance: number;
	readonly isNegative: boolean;
}

export interface LotComponents {
	readonly mean: number;
	readonly sampleSize: number;
	readonly lots: number;
	/** (N − Σnᵢ²/N)/(a − 1): the lot size of a balanced design that speaks as clearly. */
	readonly effectiveLotSize: number;
	readonly between: MeanSquare;
	readonly within: MeanSquare;
	readonly lot: Component;
	readonly device: Component;
	/** Sum of the components as shown. */
	readonly total: number;
	/** MS between / MS within, and the probability of as much when lots are alike. */
	readonly fRatio: number;
	readonly pValue: number;
}

export interface NestedComponents {
	readonly mean: number;
	readonly sampleSize: number;
	readonly lots: number;
	readonly wafers: number;
	readonly betweenLots: MeanSquare;
	readonly betweenWafers: MeanSquare;
	readonly withinWafers: MeanSquare;
	readonly lot: Component;
	readonly wafer: Component;
	readonly device: Component;
	readonly total: number;
	/** Expected mean squares: E(MS_W) = σ_E² + k₁σ_W²; E(MS_L) = σ_E² + k₂σ_W² + k₃σ_L². */
	readonly coefficients: readonly [number, number, number];
}

const meanSquare = (sumOfSquares: number, degrees: number): MeanSquare => ({
	sumOfSquares,
	degrees,
	meanSquare: sumOfSquares / degrees
});

const component = (estimate: number): Component => ({
	estimate,
	variance: Math.max(0, estimate),
	isNegative: estimate < 0
});

/** The sums of several groups taken as one. */
export function poolGroups(groups: readonly GroupSums[]): GroupSums {
	const sampleSize = groups.reduce((sum, group) => sum + group.sampleSize, 0);
	const mean = groups.reduce((sum, group) => sum + group.sampleSize * group.mean, 0) / sampleSize;
	const sumOfSquares = groups.reduce(
		(sum, group) => sum + group.sumOfSquares + group.sampleSize * (group.mean - mean) ** 2,
		0
	);
	return { sampleSize, mean, sumOfSquares };
}

/** Σ n (mean − centre)² over groups. */
const spreadOfMeans = (groups: readonly GroupSums[], centre: number) =>
	groups.reduce((sum, group) => sum + group.sampleSize * (group.mean - centre) ** 2, 0);

const sumWithin = (groups: readonly GroupSums[]) =>
	groups.reduce((sum, group) => sum + group.sumOfSquares, 0);

const sumOfSizeSquares = (groups: readonly GroupSums[]) =>
	groups.reduce((sum, group) => sum + group.sampleSize ** 2, 0);

/**
 * Lot and device variance by one-way analysis of variance, lots of any size. The mean squares are
 * kept: tolerance limits rest on them, not on components cut at zero.
 *
 * Source: Searle, Casella and McCulloch 1992, Variance Components, section 3.6.
 *
 * @throws {TooFewLotsError} for fewer than two lots
 * @throws {SampleTooSmallError} when no lot has two devices
 */
export function lotComponents(lots: readonly GroupSums[]): LotComponents {
	if (lots.length < 2) throw new TooFewLotsError('lotComponents', 2, lots.length);
	const { sampleSize, mean } = poolGroups(lots);
	if (sampleSize <= lots.length)
		throw new SampleTooSmallError('lotComponents', lots.length + 1, sampleSize);
	const between = meanSquare(spreadOfMeans(lots, mean), lots.length - 1);
	const within = meanSquare(sumWithin(lots), sampleSize - lots.length);
	const effectiveLotSize = (sampleSize - sumOfSizeSquares(lots) / sampleSize) / (lots.length - 1);
	const lot = component((between.meanSquare - within.meanSquare) / effectiveLotSize);
	const device = component(within.meanSquare);
	const fRatio = between.meanSquare / within.meanSquare;
	return {
		mean,
		sampleSize,
		lots: lots.length,
		effectiveLotSize,
		between,
		within,
		lot,
		device,
		total: lot.variance + device.variance,
		fRatio,
		pValue: fUpperTail(fRatio, { numerator: between.degrees, denominator: within.degrees })
	};
}

/**
 * Lot, wafer and device variance by nested analysis of variance with unbalanced coefficients.
 * `lots` holds for each lot the sums of its wafers.
 *
 * Source: Searle, Casella and McCulloch 1992, appendix F.1 (two-way nested classification).
 *
 * @throws {TooFewLotsError} for fewer than two lots
 * @throws {SampleTooSmallError} when no lot has two wafers, or no wafer two devices
 */
export function nestedComponents(lots: readonly (readonly GroupSums[])[]): NestedComponents {
	if (lots.length < 2) throw new TooFewLotsError('nestedComponents', 2, lots.length);
	const wafers = lots.flat();
	const pooled = lots.map(poolGroups);
	const { sampleSize, mean } = poolGroups(wafers);
	if (wafers.length <= lots.length)
		throw new SampleTooSmallError('nestedComponents wafers', lots.length + 1, wafers.length);
	if (sampleSize <= wafers.length)
		throw new SampleTooSmallError('nestedComponents', wafers.length + 1, sampleSize);

	const betweenLots = meanSquare(spreadOfMeans(pooled, mean), lots.length - 1);
	const betweenWafers = meanSquare(
		lots.reduce((sum, lot, i) => sum + spreadOfMeans(lot, pooled[i]!.mean), 0),
		wafers.length - lots.length
	);
	const withinWafers = meanSquare(sumWithin(wafers), sampleSize - wafers.length);

	const perLot = lots.reduce(
		(sum, lot, i) => sum + sumOfSizeSquares(lot) / pooled[i]!.sampleSize,
		0
	);
	const k1 = (sampleSize - perLot) / betweenWafers.degrees;
	const k2 = (perLot - sumOfSizeSquares(wafers) / sampleSize) / betweenLots.degrees;
	const k3 = (sampleSize - sumOfSizeSquares(pooled) / sampleSize) / betweenLots.degrees;

	const device = withinWafers.meanSquare;
	const wafer = (betweenWafers.meanSquare - device) / k1;
	const lot = (betweenLots.meanSquare - device - k2 * wafer) / k3;
	const shown = [component(lot), component(wafer), component(device)] as const;
	return {
		mean,
		sampleSize,
		lots: lots.length,
		wafers: wafers.length,
		betweenLots,
		betweenWafers,
		withinWafers,
		lot: shown[0],
		wafer: shown[1],
		device: shown[2],
		total: shown[0].variance + shown[1].variance + shown[2].variance,
		coefficients: [k1, k2, k3]
	};
}
