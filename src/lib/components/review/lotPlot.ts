import type { LotRange } from '$lib/core/review/verificationEvidence';

/** Heights in a plot of one unit from top to bottom; 0 is the top. */
export interface LotMark {
	readonly lot: string;
	readonly x: number;
	readonly highest: number;
	readonly lowest: number;
	readonly upperQuartile: number;
	readonly lowerQuartile: number;
	readonly median: number;
	readonly outside: readonly number[];
}

export interface LotPlot {
	readonly marks: readonly LotMark[];
	readonly minimum: number | null;
	readonly typical: number | null;
	readonly maximum: number | null;
}

/** What is printed, in the unit of the row. */
export interface PrintedLevels {
	readonly minimum: number | null;
	readonly typical: number | null;
	readonly maximum: number | null;
}

/** Share of the height that stays empty above and below. */
const MARGIN = 0.06;

/** Places the range of each lot against the printed limits, on a linear scale of its own. */
export function lotPlot(lots: readonly LotRange[], printed: PrintedLevels): LotPlot {
	const levels = [
		...lots.flatMap(({ lowest, highest }) => [lowest, highest]),
		...Object.values(printed).filter((level): level is number => level !== null)
	];
	const [low, high] = [Math.min(...levels), Math.max(...levels)];
	const range = high === low ? 1 : high - low;
	const y = (value: number) => MARGIN + (1 - 2 * MARGIN) * (1 - (value - low) / range);
	const at = (value: number | null) => (value === null ? null : y(value));
	return {
		marks: lots.map((lot, place) => ({
			lot: lot.lot,
			x: (place + 0.5) / lots.length,
			highest: y(lot.highest),
			lowest: y(lot.lowest),
			upperQuartile: y(lot.upperQuartile),
			lowerQuartile: y(lot.lowerQuartile),
			median: y(lot.median),
			outside: lot.outside.map(y)
		})),
		minimum: at(printed.minimum),
		typical: at(printed.typical),
		maximum: at(printed.maximum)
	};
}

/** What all lot names start with, up to a dash, so that the head says it once. */
export function commonPrefix(names: readonly string[]): string {
	const [first = ''] = names;
	if (names.length < 2) return '';
	let length = 0;
	while (length < first.length && names.every((name) => name[length] === first[length])) length++;
	return first.slice(0, first.slice(0, length).lastIndexOf('-') + 1);
}

/** The plot in words, for those who don't see it. */
export function plotText(lots: readonly LotRange[], unit: string): string {
	return lots
		.map(
			({ lot, devices, lowest, median, highest }) =>
				`${lot}: ${devices} devices, ${digits(lowest)} to ${digits(highest)} ${unit}, median ${digits(median)}`
		)
		.join('; ');
}

function digits(value: number): string {
	return value.toPrecision(4);
}
