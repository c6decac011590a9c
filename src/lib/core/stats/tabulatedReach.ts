import type { LotStrata } from './lotStrata';

/** Logarithm of n·V_L/V_W, the ratio of mean squares; lower ones no longer matter. */
const [FROM, STEP, SIZE] = [-9, 0.3, 61];

/** Lots and devices of a one-way design. */
export interface OneWayDesign {
	readonly lots: number;
	/** Devices a lot, or their harmonic mean. */
	readonly effectiveSize: number;
	/** Degrees of freedom within lots. */
	readonly withinDegrees: number;
}

/**
 * How far limits for future lots reach, as a function of the variance of lot means and that within
 * lots. In units of the deviation within lots it depends on their ratio alone: tabulated in the
 * logarithm of it and read by cubic interpolation, to a few parts in 10⁵. For simulations that ask
 * for it tens of thousands of times.
 */
export function tabulatedReach(
	reachOf: (strata: LotStrata) => number,
	{ lots, effectiveSize, withinDegrees }: OneWayDesign
): (ofLotMeans: number, withinLots: number) => number {
	const strataOf = (ratio: number): LotStrata => ({
		mean: 0,
		lots,
		effectiveSize,
		strata: [
			{ variance: ratio / effectiveSize, degrees: lots - 1, share: 1 },
			{ variance: 1, degrees: withinDegrees, share: 1 - 1 / effectiveSize }
		]
	});
	const table = Float64Array.from({ length: SIZE }, (_, i) =>
		Math.log(reachOf(strataOf(Math.exp(FROM + i * STEP))))
	);
	return (ofLotMeans, withinLots) => {
		const ratio = (effectiveSize * ofLotMeans) / withinLots;
		const position = Math.max(0, (Math.log(ratio) - FROM) / STEP);
		const at = Math.min(Math.max(Math.floor(position), 1), SIZE - 3);
		const x = position - at;
		const [a, b, c, d] = [table[at - 1]!, table[at]!, table[at + 1]!, table[at + 2]!];
		const cubic = c - a + x * (2 * a - 5 * b + 4 * c - d + x * (3 * (b - c) + d - a));
		return Math.exp(b + (x / 2) * cubic) * Math.sqrt(withinLots);
	};
}
