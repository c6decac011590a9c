/** A linear axis as it is printed: its ends and its ticks, all of which carry a label. */
export interface LinearAxis {
	readonly domain: readonly [number, number];
	readonly ticks: readonly number[];
	/** Decimals that every tick is printed with. */
	readonly decimals: number;
}

/** About so many steps an axis. */
const STEPS = 6;

/** Step of 1, 2, 2.5 or 5 times a power of ten that gives the axis about six of them. */
function stepFor(span: number): { digit: number; exponent: number } {
	const exponent = Math.floor(Math.log10(span / STEPS));
	const digit = [1, 2, 2.5, 5].find((each) => each * 10 ** exponent * STEPS >= span * (1 - 1e-9));
	return digit === undefined ? { digit: 1, exponent: exponent + 1 } : { digit, exponent };
}

/**
 * An axis over values, which begins and ends at a tick. Values above zero begin at zero when they
 * come within half of their range of it.
 */
export function linearAxis(lowest: number, highest: number): LinearAxis {
	const from = lowest > 0 && lowest < (highest - lowest) / 2 ? 0 : lowest;
	const span = highest - from || Math.abs(highest) || 1;
	const { digit, exponent } = stepFor(span);
	const step = Number(`${digit}e${exponent}`);
	const [first, last] = [Math.floor(from / step + 1e-9), Math.ceil((from + span) / step - 1e-9)];
	// A digit times a power of ten, without the noise of a binary product.
	const ticks = Array.from({ length: last - first + 1 }, (_, at) =>
		Number(`${(first + at) * digit}e${exponent}`)
	);
	return {
		domain: [ticks[0] ?? 0, ticks.at(-1) ?? 1],
		ticks,
		decimals: Math.max(0, -exponent + (digit === 2.5 ? 1 : 0))
	};
}
