import type { Distribution } from '../distributions/summary';
import { lotComponents } from '../stats/varianceComponents';
import { independentLots } from './independentLots';

export interface LotTest {
	readonly lots: number;
	readonly betweenDegrees: number;
	readonly withinDegrees: number;
	/** Ratio of the mean squares; `Infinity` when devices of a lot don't spread at all. */
	readonly F: number;
	/** Probability of at least this F from lots that don't differ. */
	readonly p: number;
	/** Standard deviations of the transformed values, negative components shown as 0. */
	readonly spreadBetween: number;
	readonly spreadWithin: number;
}

/** Below this probability the lots are said to differ. */
export const LOTS_DIFFER_BELOW = 0.05;

/**
 * One-way analysis of variance between independent lots (wafer lots), from the stored sums; wafers
 * of a lot are taken together. Source: NIST/SEMATECH e-Handbook, section 7.4.3.
 *
 * @returns `undefined` for a single lot, one device a lot, devices that are all alike, or some censored
 */
export function lotTest(distribution: Distribution): LotTest | undefined {
	const lots = independentLots(distribution);
	if (lots.length < 2 || distribution.sampleSize <= lots.length) return undefined;
	if (distribution.standardDeviation === 0 || distribution.censoring !== undefined)
		return undefined;
	const { between, within, lot, device, fRatio, pValue } = lotComponents(lots);
	return {
		lots: lots.length,
		betweenDegrees: between.degrees,
		withinDegrees: within.degrees,
		F: fRatio,
		p: pValue,
		spreadBetween: Math.sqrt(lot.variance),
		spreadWithin: Math.sqrt(device.variance)
	};
}
