/** Makes the median absolute deviation of a normal sample its standard deviation: 1/Φ⁻¹(3/4). */
const NORMAL = 1.482602218505602;

/** The middle value; the mean of the two middle ones for an even number. NaN for none. */
export function medianOf(values: Float64Array): number {
	const sorted = Float64Array.from(values).sort();
	const middle = Math.floor(sorted.length / 2);
	const upper = sorted[middle] ?? Number.NaN;
	return sorted.length % 2 === 1 ? upper : ((sorted[middle - 1] ?? Number.NaN) + upper) / 2;
}

/** Median, and 1.4826 × the median absolute deviation from it. */
export function robustSpread(values: Float64Array): {
	readonly median: number;
	readonly scale: number;
} {
	const median = medianOf(values);
	return { median, scale: NORMAL * medianOf(values.map((value) => Math.abs(value - median))) };
}
