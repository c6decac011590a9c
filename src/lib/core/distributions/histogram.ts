import type { DistributionSummary } from './summary';

/** A bar of equal width: from `lower` up, with this share of the devices. */
export interface HistogramBar {
	readonly lower: number;
	readonly upper: number;
	readonly share: number;
}

/**
 * A histogram from the stored quantiles, between which devices are taken to lie evenly. It shows
 * the shape; what lies beyond a limit is counted from the devices, not from here.
 *
 * @returns one bar of width 0 when all devices are alike
 */
export function histogram(
	quantiles: DistributionSummary['quantiles'],
	barCount: number
): HistogramBar[] {
	const lowest = quantiles[0]?.value ?? 0;
	const highest = quantiles.at(-1)?.value ?? 0;
	if (highest === lowest) return [{ lower: lowest, upper: highest, share: 1 }];

	const width = (highest - lowest) / barCount;
	const edges = Array.from({ length: barCount + 1 }, (_, bar) => lowest + bar * width);
	const below = edges.map((edge) => shareBelow(quantiles, edge));
	return Array.from({ length: barCount }, (_, bar) => ({
		lower: edges[bar] ?? lowest,
		upper: edges[bar + 1] ?? highest,
		share: (bar === barCount - 1 ? 1 : (below[bar + 1] ?? 1)) - (bar === 0 ? 0 : (below[bar] ?? 0))
	}));
}

/** The share of devices below a value, straight between the stored quantiles. */
function shareBelow(quantiles: DistributionSummary['quantiles'], value: number): number {
	const above = quantiles.findIndex((at) => at.value > value);
	if (above === -1) return 1;
	const [left, right] = [quantiles[above - 1], quantiles[above]];
	if (left === undefined || right === undefined) return 0;
	const within = (value - left.value) / (right.value - left.value);
	return left.probability + within * (right.probability - left.probability);
}
