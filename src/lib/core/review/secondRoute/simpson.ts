export interface Strips {
	readonly from: number;
	readonly to: number;
	/** Even. */
	readonly strips: number;
}

/** Simpson's rule over equal strips. */
export function simpson(f: (u: number) => number, { from, to, strips }: Strips): number {
	const width = (to - from) / strips;
	let sum = f(from) + f(to);
	for (let strip = 1; strip < strips; strip++)
		sum += (strip % 2 === 1 ? 4 : 2) * f(from + strip * width);
	return (sum * width) / 3;
}

/** The points of Simpson's rule and their weights. */
export function simpsonPoints({ from, to, strips }: Strips): { at: number; weight: number }[] {
	const width = (to - from) / strips;
	return Array.from({ length: strips + 1 }, (_, strip) => ({
		at: from + strip * width,
		weight: (width / 3) * (strip === 0 || strip === strips ? 1 : strip % 2 === 1 ? 4 : 2)
	}));
}
