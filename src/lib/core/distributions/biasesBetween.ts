/** The biases asked for that lie inside the measured range and were not measured, ascending. */
export function biasesBetween(measured: readonly number[], asked: readonly number[]): number[] {
	const [lowest, highest] = [Math.min(...measured), Math.max(...measured)];
	return [...new Set(asked)]
		.filter((bias) => bias > lowest && bias < highest && !measured.includes(bias))
		.sort((a, b) => a - b);
}

/** Points of a dense band. */
const BAND_POINTS = 40;

/**
 * Biases for a smooth band: evenly spaced on a log axis from the lowest positive bias measured to
 * the highest, to three significant figures, without those that were measured.
 */
export function denseBand(measured: readonly number[], points: number = BAND_POINTS): number[] {
	const lowest = Math.min(...measured.filter((bias) => bias > 0));
	const highest = Math.max(...measured);
	if (!(lowest < highest)) return [];
	const step = Math.log(highest / lowest) / (points + 1);
	return biasesBetween(
		measured,
		Array.from({ length: points }, (_, i) =>
			Number((lowest * Math.exp((i + 1) * step)).toPrecision(3))
		)
	);
}
