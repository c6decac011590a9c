import type { TopLevelSpec } from 'vega-lite';
import { chartConfig } from './chartAxes';
import {
	fixed,
	labelLayers,
	ONE_ROW,
	strokeMark,
	symbolPieces,
	type Layer,
	type Place
} from './chartParts';
import type { ChartTheme } from './chartTheme';
import { linearAxis, type LinearAxis } from './linearAxis';

/** A sweep as 1/C²: biases in V, 1/C² in 1/F², ascending by bias. */
export interface ReciprocalSweep {
	readonly name: string;
	readonly points: readonly { readonly bias: number; readonly inverseSquare: number }[];
}

export interface ReciprocalSquareData {
	readonly median: ReciprocalSweep;
	/** The same of each lot, drawn thin behind it. */
	readonly lots: readonly ReciprocalSweep[];
	/** Biases of the fit in V. */
	readonly window: readonly [number, number];
	/** 1/C² = intercept + slope · V_R, in 1/F²; `null` where the window holds no line. */
	readonly line: { readonly slope: number; readonly intercept: number } | null;
}

/** Where the plot lies inside the chart, and where a bias stands in it: for handles laid over it. */
export interface ReciprocalSquareFrame {
	readonly left: number;
	readonly top: number;
	readonly width: number;
	readonly height: number;
	readonly domain: readonly [number, number];
}

/** 1/C² is drawn in 10^n pF⁻², n the power that leaves figures before the point. */
const PICOFARAD_SQUARED = 1e-24;
const LINE_DASH = [5, 3] as const;

/** @throws {RangeError} for a median sweep without points */
export function reciprocalSquareFrame(
	data: Pick<ReciprocalSquareData, 'median' | 'line'>,
	theme: ChartTheme
): ReciprocalSquareFrame {
	const size = theme.axisSize;
	const [top, right, bottom] = [size * 1.65, size * 0.9, size * 3];
	const { domain } = biasAxis(data);
	return {
		left: theme.axisSpace,
		top,
		width: theme.width - theme.axisSpace - right,
		height: theme.height - top - bottom,
		domain
	};
}

/** From where the line meets zero, if that is near, to the highest bias. */
function biasAxis({ median, line }: Pick<ReciprocalSquareData, 'median' | 'line'>): LinearAxis {
	const biases = median.points.map(({ bias }) => bias);
	const [lowest, highest] = [Math.min(...biases), Math.max(...biases)];
	if (!Number.isFinite(lowest)) throw new RangeError('a 1/C² plot requires a median sweep');
	const meets = line === null ? lowest : -line.intercept / line.slope;
	// A line that meets zero further out than the sweep is wide would squeeze the sweep.
	const from = Math.max(Math.min(lowest, meets), lowest - (highest - lowest));
	const axis = linearAxis(from, highest);
	// Ticks stay round; the axis itself ends where there is nothing more to see.
	const domain = [from - (highest - from) * 0.02, highest] as const;
	return {
		...axis,
		domain,
		ticks: axis.ticks.filter((tick) => tick >= domain[0] && tick <= highest)
	};
}

/** 1/C² of the median sweep against bias, with the line through the biases of a window. */
export function reciprocalSquareChart(data: ReciprocalSquareData, theme: ChartTheme): TopLevelSpec {
	const frame = reciprocalSquareFrame(data, theme);
	const biases = biasAxis(data);
	const all = [data.median, ...data.lots].flatMap(({ points }) =>
		points.map(({ inverseSquare }) => inverseSquare * PICOFARAD_SQUARED)
	);
	const largest = Math.max(...all);
	const power = Math.floor(Math.log10(largest));
	const scale = PICOFARAD_SQUARED / 10 ** power;
	const values = linearAxis(0, largest / 10 ** power);
	const rowsOf = ({ points }: ReciprocalSweep) =>
		points.map(({ bias, inverseSquare }) => ({ bias, value: inverseSquare * scale }));
	const [from, to] = data.window;
	return {
		$schema: 'https://vega.github.io/schema/vega-lite/v6.json',
		description: `1/C² of the junction against reverse voltage, with the line through ${from} V to ${to} V.`,
		background: theme.paper,
		padding: {
			left: theme.axisSpace,
			top: frame.top,
			right: theme.width - frame.left - frame.width,
			bottom: theme.height - frame.top - frame.height
		},
		autosize: { type: 'none' },
		width: frame.width,
		height: frame.height,
		config: chartConfig(theme),
		data: { values: [] },
		encoding: {
			x: { field: 'bias', type: 'quantitative', ...straight(biases, theme), title: null },
			y: { field: 'value', type: 'quantitative', ...straight(values, theme), title: null }
		},
		layer: [
			{
				data: { values: [{ bias: from, end: to }] },
				mark: { type: 'rect', color: theme.band, opacity: 1, clip: true },
				encoding: { x2: { field: 'end' }, y: { value: 0 }, y2: { value: frame.height } }
			},
			...data.lots.map((lot): Layer => ({
				data: { values: rowsOf(lot) },
				mark: { type: 'line', clip: true, ...strokeMark(theme.leader) }
			})),
			{
				data: { values: rowsOf(data.median) },
				mark: { type: 'line', clip: true, ...strokeMark(theme.typical) }
			},
			...(data.line === null ? [] : [lineLayer(data.line, biases.domain, scale, theme)]),
			{
				data: { values: rowsOf(data.median) },
				mark: { type: 'point', filled: true, size: 26, color: theme.ink, opacity: 1, clip: true }
			},
			...windowEdges(data.window, frame, theme),
			...axisNames(power, frame, theme)
		]
	};
}

function straight({ domain, ticks, decimals }: LinearAxis, theme: ChartTheme) {
	return {
		scale: { type: 'linear' as const, domain: [...domain], nice: false, zero: false },
		axis: {
			values: [...ticks],
			labelExpr: `(datum.value < 0 ? '\u2212' : '') + format(abs(datum.value), '.${decimals}f')`,
			grid: true,
			gridColor: theme.grid.color,
			gridWidth: theme.grid.width
		}
	};
}

/** The line over the whole axis, from where it is above zero. */
function lineLayer(
	{ slope, intercept }: { readonly slope: number; readonly intercept: number },
	[from, to]: readonly [number, number],
	scale: number,
	theme: ChartTheme
): Layer {
	const begin = Math.max(from, -intercept / slope);
	const at = (bias: number) => ({ bias, value: (intercept + slope * bias) * scale });
	return {
		data: { values: [at(begin), at(to)] },
		mark: {
			type: 'line',
			clip: true,
			stroke: theme.ink,
			strokeWidth: theme.maximum.width,
			strokeDash: [...LINE_DASH]
		}
	};
}

function windowEdges(
	window: readonly [number, number],
	frame: ReciprocalSquareFrame,
	theme: ChartTheme
): Layer[] {
	const place = (bias: number): Place => ({ x: xOf(frame, bias), y: 0 });
	return window.map((bias): Layer => ({
		data: ONE_ROW,
		mark: { type: 'rule', ...strokeMark(theme.leader) },
		encoding: { ...fixed(place(bias)), y2: { value: frame.height } }
	}));
}

/** Place of a bias from the left edge of the frame. */
export function xOf({ domain, width }: ReciprocalSquareFrame, bias: number): number {
	const [from, to] = domain;
	return ((bias - from) / (to - from)) * width;
}

function axisNames(power: number, frame: ReciprocalSquareFrame, theme: ChartTheme): Layer[] {
	const size = theme.axisSize;
	const factor = power === 0 ? '' : `10${superscript(power)} `;
	return [
		...labelLayers(
			symbolPieces({ quantity: '1/C', subscript: 'j' }, `² in ${factor}pF⁻²`, size),
			{ x: 0, y: -size * 0.55, align: 'left' },
			theme.ink
		),
		...labelLayers(
			symbolPieces({ quantity: 'V', subscript: 'R' }, ' in V', size),
			{ x: frame.width, y: frame.height + size * 2.55, align: 'right' },
			theme.ink
		)
	];
}

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const superscript = (power: number) =>
	`${power < 0 ? '⁻' : ''}${[...String(Math.abs(power))].map((digit) => RAISED[Number(digit)]).join('')}`;
