import type { TopLevelSpec } from 'vega-lite';
import { BASES } from '../core/limits/basis';
import type { LetterSymbol } from '../core/characteristics/symbol';
import { basisKeyLayers, basisMarkLayers } from './basisMarks';
import type { CapacitancePoint } from './capacitancePoint';
import { labelLayers, leaderLabel, strokeMark, symbolPieces, type Layer } from './chartParts';
import type { ChartTheme } from './chartTheme';
import { chartConfig, lineAxis } from './chartAxes';
import { logAxis, wholeDigitAbove, type LogAxis } from './logAxis';
import { readingLayers } from './readingLayers';

/** One device's curve behind the band, in the chart's unit. */
export interface DeviceSweep {
	readonly name: string;
	/** Whether it leaves the band somewhere. */
	readonly isOutside: boolean;
	readonly readings: readonly { readonly bias: number; readonly capacitance: number }[];
}

export interface CapacitanceChartData {
	/** Symbol of the capacitance; total capacitance by default. */
	readonly symbol?: LetterSymbol;
	readonly unit: string;
	readonly points: readonly CapacitancePoint[];
	readonly sweeps?: readonly DeviceSweep[];
	/** Preliminary limits are called provisional instead of guaranteed. */
	readonly isProvisional?: boolean;
}

const TOTAL_CAPACITANCE: LetterSymbol = { quantity: 'C', subscript: 'tot' };
const REVERSE_VOLTAGE: LetterSymbol = { quantity: 'V', subscript: 'R' };

/** Both axes are logarithmic: rows at zero or forward bias stand in the table only. */
const hasPlace = (point: CapacitancePoint) => point.bias > 0 && point.typical > 0;

/** What the caption must add when rows of the table have no place on the axis; `null` when all have. */
export function leftOutOfChart(points: readonly CapacitancePoint[]): string | null {
	const biases = points.filter((point) => !hasPlace(point)).map((point) => point.bias);
	if (biases.length === 0) return null;
	const volts = biases.map((bias) => String(bias).replace('-', '\u2212')).join(', ');
	return `The logarithmic axis begins at the first positive bias; ${volts}\u00a0V: see the table.`;
}

/**
 * Capacitance against reverse bias: typical curve and guaranteed band, and below it the same limits
 * as deviation from typical. The band goes straight between the printed limits.
 *
 * @returns `null` when fewer than two rows have a place on the axes
 */
export function capacitanceChart(
	data: CapacitanceChartData,
	theme: ChartTheme
): TopLevelSpec | null {
	const points = data.points.filter(hasPlace);
	const [first, last] = [points[0], points.at(-1)];
	if (!first || !last || first === last) return null;

	const frame = panelSizes(theme);
	const drawn = points.flatMap(({ minimum, typical, maximum }) =>
		[minimum, typical, maximum].filter((value) => value !== null && value > 0)
	) as number[];
	const biases = logAxis(first.bias, wholeDigitAbove(last.bias));
	const capacitances = logAxis(Math.min(...drawn) * 0.8, Math.max(...drawn) * 1.2);
	const rows = points.map((point) => ({
		...point,
		below: deviation(point.minimum, point.typical),
		above: deviation(point.maximum, point.typical)
	}));
	const bases = BASES.filter((basis) => points.some((point) => point.basis === basis));
	const furthest = Math.max(...rows.flatMap(({ below, above }) => [-(below ?? 0), above ?? 0]));

	return {
		$schema: 'https://vega.github.io/schema/vega-lite/v6.json',
		description: describe(data, points),
		background: theme.paper,
		padding: { left: theme.axisSpace, top: frame.top, right: frame.right, bottom: frame.bottom },
		autosize: { type: 'none' },
		// A concatenation states no size of its own; these signals give Vega the outer frame.
		params: [
			{ name: 'width', value: frame.width },
			{ name: 'height', value: frame.upper + frame.gap + frame.lower }
		],
		spacing: frame.gap,
		bounds: 'flush',
		config: chartConfig(theme),
		data: { values: rows },
		vconcat: [
			{
				width: frame.width,
				height: frame.upper,
				encoding: {
					x: biasChannel(biases, theme, { hasLabels: false }),
					y: {
						type: 'quantitative',
						scale: { type: 'log', domain: [...capacitances.domain], nice: false },
						axis: lineAxis(capacitances, theme),
						title: null
					}
				},
				layer: [
					...sweepLayers(data.sweeps ?? [], theme),
					...bandLayers('minimum', 'maximum', theme),
					{
						mark: { type: 'line', interpolate: 'monotone', ...strokeMark(theme.typical) },
						encoding: { y: { field: 'typical', type: 'quantitative' } }
					},
					...curveLabels(data, points, { biases, capacitances, ...frame }, theme),
					...labelLayers(
						symbolPieces(data.symbol ?? TOTAL_CAPACITANCE, ` in ${data.unit}`, theme.axisSize),
						{ x: 0, y: -theme.axisSize * 0.55, align: 'left' },
						theme.ink
					),
					...(theme.isInteractive ? readingLayers(rows, data.unit, frame, theme) : [])
				]
			},
			{
				width: frame.width,
				height: frame.lower,
				encoding: {
					x: biasChannel(biases, theme, { hasLabels: true }),
					y: deviationChannel(furthest, theme)
				},
				layer: [
					...bandLayers('below', 'above', theme),
					{
						mark: { type: 'line', ...strokeMark(theme.typical) },
						encoding: { y: { datum: 0 } }
					},
					...['below', 'above'].flatMap((column) =>
						basisMarkLayers(column, bases, frame.mark(points.length), theme)
					),
					...basisKeyLayers(
						bases,
						{ x: 0, y: frame.lower + frame.key, width: frame.width - theme.axisSize * 4 },
						frame.mark(1),
						theme
					),
					...labelLayers(
						symbolPieces(REVERSE_VOLTAGE, ' in V', theme.axisSize),
						{ x: frame.width, y: frame.lower + frame.key, align: 'right' },
						theme.ink
					)
				]
			}
		]
	};
}

/** Frames of the two panels and the space around them. */
function panelSizes(theme: ChartTheme) {
	const size = theme.axisSize;
	const around = { top: size * 1.65, right: size * 0.6, bottom: size * 3, gap: size * 1.65 };
	const height = theme.height - around.top - around.bottom - around.gap;
	return {
		...around,
		width: theme.width - theme.axisSpace - around.right,
		upper: height * 0.736,
		lower: height * 0.264,
		/** Baseline of the key below the lower frame. */
		key: size * 2.55,
		/** Diameter of a mark: smaller where many rows stand close together. */
		mark: (rows: number) => size * (rows > 60 ? 0.25 : 0.46)
	};
}

const deviation = (limit: number | null, typical: number) =>
	limit === null ? null : (limit / typical - 1) * 100;

function describe(data: CapacitanceChartData, points: readonly CapacitancePoint[]): string {
	const [first, last] = [points[0], points.at(-1)];
	return (
		`Capacitance against reverse voltage, both logarithmic, with minimum and maximum. Typical ` +
		`${first?.typical} ${data.unit} at ${first?.bias} V, falling to ${last?.typical} ${data.unit} ` +
		`at ${last?.bias} V. Every value stands in the capacitance table.`
	);
}

function biasChannel(biases: LogAxis, theme: ChartTheme, show: { readonly hasLabels: boolean }) {
	return {
		field: 'bias',
		type: 'quantitative' as const,
		scale: { type: 'log' as const, domain: [...biases.domain], nice: false },
		axis: lineAxis(biases, theme, show.hasLabels),
		title: null
	};
}

/** Deviation in % on a linear axis, symmetrical about typical. */
function deviationChannel(furthest: number, theme: ChartTheme) {
	const end = (furthest === 0 ? 5 : furthest) * 1.18;
	const step = [50, 20, 10, 5, 2, 1, 0.5, 0.2, 0.1].find((each) => each * 1.5 <= end) ?? 0.1;
	const ticks = Math.min(Math.floor(end / step), 20);
	return {
		type: 'quantitative' as const,
		scale: { domain: [-end, end], nice: false, zero: false },
		axis: {
			title: 'from typical, %',
			titleX: theme.axisSize * 0.95 - theme.axisSpace,
			values: Array.from({ length: 2 * ticks + 1 }, (_, at) => (at - ticks) * step),
			labelExpr: `(datum.value > 0 ? '+' : datum.value < 0 ? '\u2212' : '') + format(abs(datum.value), '~g')`,
			grid: true,
			gridColor: theme.grid.color,
			gridWidth: theme.grid.width
		}
	};
}

/** The tinted band where both limits stand, and each limit with its own dashes. */
function bandLayers(lower: string, upper: string, theme: ChartTheme): Layer[] {
	const limit = (column: string, stroke: ChartTheme['minimum']): Layer => ({
		mark: { type: 'line', invalid: 'break-paths-show-domains', ...strokeMark(stroke) },
		encoding: { y: { field: column, type: 'quantitative' } }
	});
	return [
		{
			transform: [{ calculate: `datum.${upper} === null ? null : datum.${lower}`, as: 'edge' }],
			mark: { type: 'area', color: theme.band, opacity: 1, invalid: 'break-paths-show-domains' },
			encoding: {
				y: { field: 'edge', type: 'quantitative' },
				y2: { field: upper }
			}
		},
		limit(upper, theme.maximum),
		limit(lower, theme.minimum)
	];
}

function sweepLayers(sweeps: readonly DeviceSweep[], theme: ChartTheme): Layer[] {
	return [false, true].flatMap((isOutside) => {
		const values = sweeps
			.filter((sweep) => sweep.isOutside === isOutside)
			.flatMap(({ name, readings }) =>
				readings.filter(({ bias }) => bias > 0).map((reading) => ({ ...reading, name }))
			);
		return values.length === 0
			? []
			: [
					{
						data: { values },
						mark: {
							type: 'line' as const,
							clip: true,
							...strokeMark(isOutside ? theme.outside : theme.sweep)
						},
						encoding: {
							y: { field: 'capacitance', type: 'quantitative' as const },
							detail: { field: 'name', type: 'nominal' as const }
						}
					}
				];
	});
}

interface Scales {
	readonly biases: LogAxis;
	readonly capacitances: LogAxis;
	readonly width: number;
	readonly upper: number;
}

/** Names at the curves: maximum and typical above them, where a falling curve leaves room, minimum below. */
function curveLabels(
	data: CapacitanceChartData,
	points: readonly CapacitancePoint[],
	scales: Scales,
	theme: ChartTheme
): Layer[] {
	const em = theme.labelSize;
	const word = data.isProvisional ? 'provisional' : 'guaranteed';
	const onCurve = (column: 'minimum' | 'typical' | 'maximum', share: number) =>
		placeOnCurve(points, column, share, scales);
	const highest = (x: number) =>
		(onCurve('maximum', x / scales.width) ?? onCurve('typical', x / scales.width))?.y ?? 0;
	const above = (share: number, column: 'typical' | 'maximum', right: number, up: number) => {
		const curve = onCurve(column, share);
		if (!curve) return null;
		const x = curve.x + right * em;
		return { curve, label: { x, y: Math.max(em * 1.2, highest(x) - up * em) } };
	};

	const maximum = above(0.385, 'maximum', 2.2, 1.4);
	const typical = above(0.49, 'typical', 3.8, 0.9);
	const minimum = onCurve('minimum', 0.53);
	return [
		...(maximum ? leaderLabel(`maximum, ${word}`, { ...maximum, align: 'left' }, theme) : []),
		...(typical ? leaderLabel('typical (median)', { ...typical, align: 'left' }, theme) : []),
		...(minimum
			? leaderLabel(
					`minimum, ${word}`,
					{
						curve: minimum,
						label: {
							x: minimum.x - em * 2.2,
							y: Math.min(scales.upper - em * 0.6, minimum.y + em * 2.4)
						},
						align: 'right'
					},
					theme
				)
			: [])
	];
}

/** The place of a column's curve at a share of the bias axis, straight in log–log between rows. */
function placeOnCurve(
	points: readonly CapacitancePoint[],
	column: 'minimum' | 'typical' | 'maximum',
	share: number,
	scales: Scales
) {
	const [from, to] = scales.biases.domain;
	const [bottom, top] = scales.capacitances.domain;
	const bias = from * (to / from) ** share;
	const after = points.findIndex((point) => point.bias >= bias);
	const [left, right] = [points[after - 1], points[after]];
	const [start, end] = [left?.[column] ?? null, right?.[column] ?? null];
	if (!left || !right || start === null || end === null) return null;

	const part = Math.log(bias / left.bias) / Math.log(right.bias / left.bias);
	const value = start * (end / start) ** part;
	return {
		x: share * scales.width,
		y: scales.upper * (1 - Math.log(value / bottom) / Math.log(top / bottom))
	};
}
