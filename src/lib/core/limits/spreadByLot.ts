import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import { independentLots } from './independentLots';
import { lotTest } from './lotTest';
import { medianOf } from './typicalValue';

/** Where the devices of one lot lie, in the unit asked for. */
export interface LotRange {
	readonly name: string;
	readonly sampleSize: number;
	readonly lowest: number;
	/** Mean of the transformed values, turned back: the geometric mean for a logarithm. */
	readonly centre: number;
	readonly highest: number;
	/** Of the centre from the median of all devices, in %. */
	readonly deviationPercent: number;
}

export interface SpreadByLot {
	readonly lots: readonly LotRange[];
	/** Relative standard deviations in %; `null` for one lot, or where values are not logarithms. */
	readonly betweenPercent: number | null;
	readonly withinPercent: number | null;
}

/** What the stored sums say about the lots of a distribution, without its devices. */
export function spreadByLot(distribution: Distribution, unitScale: number): SpreadByLot {
	const { invert } = TRANSFORMS[distribution.transform];
	const median = medianOf(distribution);
	const test = lotTest(distribution);
	const isRelative = distribution.transform === 'ln' && test !== undefined;
	return {
		lots: independentLots(distribution).map((lot) => ({
			name: lot.name,
			sampleSize: lot.sampleSize,
			lowest: lot.lowest / unitScale,
			centre: invert(lot.mean) / unitScale,
			highest: lot.highest / unitScale,
			deviationPercent: (invert(lot.mean) / median - 1) * 100
		})),
		betweenPercent: isRelative ? test.spreadBetween * 100 : null,
		withinPercent: isRelative ? test.spreadWithin * 100 : null
	};
}
