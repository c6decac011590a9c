import type { Distribution } from '../distributions/summary';
import { fUpperTail } from '../stats/fDistribution';

export interface LotTest {
	readonly lots: number;
	readonly betweenDegrees: number;
	readonly withinDegrees: number;
	readonly meanSquareBetween: number;
	readonly meanSquareWithin: number;
	/** Ratio of the mean squares; `Infinity` when devices of a lot don't spread at all. */
	readonly F: number;
	/** Probability of at least this F from lots that don't differ. */
	readonly p: number;
}

/** Below this probability the lots are said to differ. */
export const LOTS_DIFFER_BELOW = 0.05;

/**
 * One-way analysis of variance between independent lots (wafer lots), from the stored sums; wafers
 * of a lot are taken together. Source: NIST/SEMATECH e-Handbook, section 7.4.3.
 *
 * @returns `undefined` for a single lot, one device a lot, or devices that are all alike
 */
export function lotTest(distribution: Distribution): LotTest | undefined {
	const lots = new Map<string, { size: number; total: number }>();
	for (const { waferLot, sampleSize, mean } of distribution.groups) {
		const lot = lots.get(waferLot) ?? { size: 0, total: 0 };
		lots.set(waferLot, { size: lot.size + sampleSize, total: lot.total + sampleSize * mean });
	}
	const betweenDegrees = lots.size - 1;
	const withinDegrees = distribution.sampleSize - lots.size;
	if (betweenDegrees < 1 || withinDegrees < 1) return undefined;

	let between = 0;
	for (const { size, total } of lots.values()) {
		between += size * (total / size - distribution.mean) ** 2;
	}
	let within = 0;
	for (const of of distribution.groups) {
		const lot = lots.get(of.waferLot);
		const lotMean = lot === undefined ? of.mean : lot.total / lot.size;
		within += of.sumOfSquares + of.sampleSize * (of.mean - lotMean) ** 2;
	}

	const meanSquareBetween = between / betweenDegrees;
	const meanSquareWithin = within / withinDegrees;
	if (meanSquareBetween === 0 && meanSquareWithin === 0) return undefined;
	const F = meanSquareBetween / meanSquareWithin;
	return {
		lots: lots.size,
		betweenDegrees,
		withinDegrees,
		meanSquareBetween,
		meanSquareWithin,
		F,
		p: Number.isFinite(F)
			? fUpperTail(F, { numerator: betweenDegrees, denominator: withinDegrees })
			: 0
	};
}
