import type { HistogramBar } from '$lib/core/distributions/histogram';
import type { SpreadByLot } from '$lib/core/limits/spreadByLot';

/** How the values at one condition lie, in the unit of the table: no devices, their sums only. */
export interface Spread extends SpreadByLot {
	readonly bars: readonly HistogramBar[];
}

/** The printed limits, as numbers in the unit of the table. */
export interface LimitNumbers {
	readonly minimum: number | null;
	readonly typical: number | null;
	readonly maximum: number | null;
}

/** A value's place across a figure. */
export interface ValueScale {
	readonly lowest: number;
	readonly highest: number;
	readonly at: (value: number) => number;
}

/** A straight scale from `left` to `right` that shows every value and limit, with some air. */
export function valueScale(
	spread: Spread,
	limits: LimitNumbers,
	{
		left,
		right,
		further
	}: { readonly left: number; readonly right: number; readonly further?: LimitNumbers }
): ValueScale {
	const values = [
		...spread.lots.flatMap(({ lowest, highest }) => [lowest, highest]),
		...[limits, further ?? limits]
			.flatMap(({ minimum, typical, maximum }) => [minimum, typical, maximum])
			.filter((value) => value !== null)
	];
	const [least, most] = [Math.min(...values), Math.max(...values)];
	const air = most > least ? (most - least) * 0.06 : Math.abs(most) * 0.01;
	const [lowest, highest] = [least - air, most + air];
	return {
		lowest,
		highest,
		at: (value) => left + ((value - lowest) / (highest - lowest)) * (right - left)
	};
}

/** Three to six round numbers within the scale. */
export function roundTicks({ lowest, highest }: ValueScale): number[] {
	const power = 10 ** Math.floor(Math.log10(highest - lowest));
	const step =
		[0.2, 0.5, 1, 2, 5].map((of) => of * power).find((of) => (highest - lowest) / of <= 6) ??
		power * 10;
	const first = Math.ceil(lowest / step);
	const count = Math.floor(highest / step) - first + 1;
	return Array.from({ length: Math.max(0, count) }, (_, tick) =>
		Number(((first + tick) * step).toPrecision(10))
	);
}

export interface LimitMark {
	readonly kind: 'min' | 'typ' | 'max';
	readonly x: number;
	/** Where its label stands: moved aside so that no two labels meet. */
	readonly labelX: number;
}

/**
 * The marks of the printed limits. Labels stand at least `gap` apart and with their middle at least
 * half of that within the figure, so that none is cut.
 */
export function limitMarks(
	limits: LimitNumbers,
	scale: ValueScale,
	{ gap, width }: { readonly gap: number; readonly width: number }
): LimitMark[] {
	const typical = limits.typical === null ? null : scale.at(limits.typical);
	const within = (x: number) => Math.min(width - gap / 2, Math.max(gap / 2, x));
	const mark = (kind: LimitMark['kind'], value: number | null, side: -1 | 1): LimitMark[] => {
		if (value === null) return [];
		const x = scale.at(value);
		const free = typical === null ? x : typical + side * gap;
		return [{ kind, x, labelX: within(side < 0 ? Math.min(x, free) : Math.max(x, free)) }];
	};
	return [
		...mark('min', limits.minimum, -1),
		...(typical === null ? [] : [{ kind: 'typ' as const, x: typical, labelX: typical }]),
		...mark('max', limits.maximum, 1)
	];
}

/** Printed digits as a number for a figure. */
export function readLimit(text: string | null): number | null {
	return text === null ? null : Number(text.replace('\u2212', '-'));
}
