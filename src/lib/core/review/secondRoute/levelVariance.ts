import { chiSquareBeyond } from './chiSquareBeyond';
import type { Level } from './lotSpread';

/** Strips of the integral, in ln χ² where it is far from its bound and in its logarithm near it. */
const STEP = 0.08;
const NEAREST_LOG = -18;
/** Where the density of ln χ² is below 1e-14 of its peak. */
const LOWEST_LOG = -32;

/** A variance share·SS/χ² that isn't known for sure. */
export interface LevelVariance {
	/** E[f(V); V < bound]. */
	expect(bound: number, f: (variance: number) => number): number;
}

/** Probability that a variance, or a sum of them, is at most so large. */
export interface VarianceTable {
	below(variance: number): number;
}

/**
 * Expectations over the variance of one level. With χ² = e^t the values below a bound are those
 * from a t* on; t = t* + ln(1 + e^y) puts points as densely at t* as a sharp f needs them.
 */
export function levelVariance({ squares, degrees, share }: Level): LevelVariance {
	const scale = share * squares;
	const peak = Math.log(degrees);
	const logDensity = (t: number) => (degrees / 2) * (t - peak) - (Math.exp(t) - degrees) / 2;
	let [from, to] = [peak, peak];
	while (logDensity(from) > LOWEST_LOG) from -= 1 / Math.sqrt(degrees);
	while (logDensity(to) > LOWEST_LOG) to += 1 / Math.sqrt(degrees);
	const step = Math.min(STEP, Math.sqrt(2 / degrees) / 4);

	let whole = 0;
	for (let t = from; t < to; t += step) whole += step * Math.exp(logDensity(t));

	return {
		expect(bound, f) {
			if (scale === 0) return bound > 0 ? f(0) : 0;
			if (!(bound > 0)) return 0;
			const start = Math.max(Math.log(scale / bound), from);
			let sum = 0;
			for (let y = NEAREST_LOG; ; y += step) {
				const t = start + (y > 30 ? y : Math.log1p(Math.exp(y)));
				if (t > to) break;
				const value = f(scale / Math.exp(t));
				if (value > 0) sum += (value * Math.exp(logDensity(t))) / (1 + Math.exp(-y));
			}
			return (sum * step) / whole;
		}
	};
}

/** Spacing of a table in the logarithm of the variance. */
const TABLE_STEP = 0.02;
/** Below this probability a table ends with 0, above 1 less it with 1. */
const END = 1e-11;
const WIDEST = 60;

/** The distribution of the sum of the levels inside a lot. */
export function sumOfLevels(levels: readonly Level[]): VarianceTable {
	const [first, second] = levels.toSorted((a, b) => b.degrees - a.degrees);
	if (first === undefined) throw new RangeError('a lot requires a level inside of it');
	const closed =
		({ squares, degrees, share }: Level) =>
		(variance: number) =>
			variance <= 0 ? 0 : chiSquareBeyond((share * squares) / variance, degrees);
	if (second === undefined) return tableOf(closed(first), centreOf(first));
	const [sharper, wider] = [levelVariance(first), closed(second)];
	return tableOf(
		(sum) => sharper.expect(sum, (variance) => wider(sum - variance)),
		centreOf(first) + centreOf(second)
	);
}

const centreOf = ({ squares, degrees, share }: Level) => (share * squares) / degrees;

/** A distribution kept at equal steps of the logarithm, read by cubics through four points. */
function tableOf(below: (variance: number) => number, centre: number): VarianceTable {
	if (centre === 0) return { below: (variance) => (variance >= 0 ? 1 : 0) };
	const middle = Math.log(centre);
	const at = (index: number) => below(Math.exp(middle + index * TABLE_STEP));
	const values: number[] = [];
	let first = 0;
	while (first > -WIDEST / TABLE_STEP && at(first) > END) first -= 25;
	for (let index = first; index < WIDEST / TABLE_STEP; index++) {
		const value = at(index);
		values.push(value);
		if (value > 1 - END) break;
	}
	return {
		below(variance) {
			if (variance <= 0) return 0;
			const place = (Math.log(variance) - middle) / TABLE_STEP - first;
			if (place < 1) return 0;
			if (place >= values.length - 2) return values.at(-1) ?? 1;
			const left = Math.floor(place);
			const u = place - left;
			const [a = 0, b = 0, c = 0, d = 0] = values.slice(left - 1, left + 3);
			return b + (u / 2) * (c - a + u * (2 * a - 5 * b + 4 * c - d + u * (3 * (b - c) + d - a)));
		}
	};
}
