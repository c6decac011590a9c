import type { TopLevelSpec } from 'vega-lite';
import type { DeviceSweep } from './capacitanceChart';
import type { CapacitancePoint } from './capacitancePoint';
import { chartConfig, lineAxis } from './chartAxes';
import { labelLayers, strokeMark, symbolPieces, type Layer } from './chartParts';
import type { ChartTheme } from './chartTheme';
import { linearAxis } from './linearAxis';
import { logAxis, wholeDigitAbove } from './logAxis';
import { placeApart } from './placeApart';
import { readingLayers } from './readingLayers';

/** Limits and median at a bias before rounding, in the chart's unit. */
export interface BandPoint {
	readonly bias: number;
	readonly minimum: number | null;
	readonly typical: number;
	readonly maximum: number | null;
}

export type AxisKind = 'log' | 'linear';

export interface BandChartData {
	readonly unit: string;
	/** Printed rows: what a reading at the pointer says. */
	readonly rows: readonly CapacitancePoint[];
	/** The curves, at measured biases and between them, ascending. */
	readonly band: readonly BandPoint[];
	readonly sweeps: readonly DeviceSweep[];
	readonly axes: { readonly bias: AxisKind; readonly capacitance: AxisKind };
}

/** What a logarithmic bias axis must leave out. */
const hasPlace = (kind: AxisKind) => (point: { readonly bias: number }) =>
	kind === 'linear' || point.bias > 0;

/**
 * The engineers' chart of a curve: band, a sample of sweeps over it, limits and median; below it the
 * same as deviation from the median. Either axis is logarithmic or linear.
 *
 * @returns `null` when fewer than two biases have a place on the axes
 */
export function bandChart(data: BandChartData, theme: ChartTheme): TopLevelSpec | null {
	const isDrawn = hasPlace(data.axes.bias);
	const band = data.band.filter(isDrawn).filter(({ typical }) => typical > 0);
	const [first, last] = [band[0], band.at(-1)];
	if (!first || !last || first === last) return null;

	const frame = panels(theme);
	const points = band.map((point) => ({
		...point,
		below: deviation(point.minimum, point.typical),
		above: deviation(point.maximum, point.typical)
	}));
	const readings = data.rows.filter(isDrawn).map((row) => ({
		...row,
		below: deviation(row.minimum, row.typical),
		above: deviation(row.maximum, row.typical)
	}));
	const drawn = band.flatMap(({ minimum, typical, maximum }) =>
		[minimum, typical, maximum].filter((value) => value !== null && value > 0)
	) as number[];
	const biases = axisOf(data.axes.bias, first.bias, last.bias, theme);
	const capacitances = axisOf(
		data.axes.capacitance,
		Math.min(...drawn) * 0.9,
		Math.max(...drawn) * 1.1,
		theme
	);
	const furthest = Math.max(
		1e-3,
		...points.flatMap(({ below, above }) => [-(below ?? 0), above ?? 0])
	);
	const x = (hasLabels: boolean) => ({
		field: 'bias',
		type: 'quantitative' as const,
		scale: biases.scale,
		axis: hasLabels ? biases.axis : { ...biases.axis, labels: false, ticks: false },
		title: null
	});
	const relative = axisOf('linear', -furthest * 1.25, furthest * 1.25, theme);
	return {
		$schema: 'https://vega.github.io/schema/vega-lite/v6.json',
		description: `Capacitance against reverse voltage with minimum and maximum, from ${first.bias} V to ${last.bias} V.`,
		background: theme.paper,
		padding: { left: theme.axisSpace, top: frame.top, right: frame.right, bottom: frame.bottom },
		autosize: { type: 'none' },
		params: [
			{ name: 'width', value: frame.width },
			{ name: 'height', value: frame.upper + frame.gap + frame.lower }
		],
		spacing: frame.gap,
		bounds: 'flush',
		config: chartConfig(theme),
		data: { values: points },
		vconcat: [
			{
				width: frame.width,
				height: frame.upper,
				encoding: {
					x: x(false),
					y: {
						type: 'quantitative',
						scale: capacitances.scale,
						axis: capacitances.axis,
						title: null
					}
				},
				layer: [
					areaLayer('minimum', 'maximum', theme),
					...sweepLayers(sweepRows(data.sweeps, isDrawn), 'capacitance', theme),
					...curveLayers(['maximum', 'typical', 'minimum'], theme),
					...endLabels(last, capacitances.share, frame, frame.upper, theme),
					...labelLayers(
						symbolPieces({ quantity: 'C', subscript: 'tot' }, ` in ${data.unit}`, theme.axisSize),
						{ x: 0, y: -theme.axisSize * 0.55, align: 'left' },
						theme.ink
					),
					...readingLayers(readings, data.unit, frame, theme)
				]
			},
			{
				width: frame.width,
				height: frame.lower,
				encoding: {
					x: x(true),
					y: { type: 'quantitative', scale: relative.scale, axis: relative.axis, title: null }
				},
				layer: [
					areaLayer('below', 'above', theme),
					...sweepLayers(deviationRows(data, isDrawn), 'deviation', theme),
					{
						mark: { type: 'line', ...strokeMark(theme.typical) },
						encoding: { y: { datum: 0 } }
					},
					curveLayer('above', theme.maximum),
					curveLayer('below', theme.minimum),
					...labelLayers(
						[{ text: 'Deviation from typ in %', size: theme.axisSize, style: 'upright', drop: 0 }],
						{ x: 0, y: -theme.axisSize * 0.45, align: 'left' },
						theme.ink
					),
					...labelLayers(
						symbolPieces({ quantity: 'V', subscript: 'R' }, ' in V', theme.axisSize),
						{ x: frame.width, y: frame.lower + theme.axisSize * 2.55, align: 'right' },
						theme.ink
					)
				]
			}
		]
	};
}

function panels(theme: ChartTheme) {
	const size = theme.axisSize;
	const around = { top: size * 1.65, right: size * 3.2, bottom: size * 3, gap: size * 2 };
	const height = theme.height - around.top - around.bottom - around.gap;
	return {
		...around,
		width: theme.width - theme.axisSpace - around.right,
		upper: height * 0.7,
		lower: height * 0.3
	};
}
type Panels = ReturnType<typeof panels>;

const deviation = (limit: number | null, typical: number) =>
	limit === null ? null : (limit / typical - 1) * 100;

/** An axis of a kind over these values, and where a value lies along it. */
function axisOf(kind: AxisKind, lowest: number, highest: number, theme: ChartTheme) {
	if (kind === 'log') {
		const lines = logAxis(lowest, wholeDigitAbove(highest));
		const [from, to] = lines.domain;
		return {
			scale: { type: 'log' as const, domain: [from, to], nice: false },
			axis: lineAxis(lines, theme),
			share: (value: number) => Math.log(value / from) / Math.log(to / from)
		};
	}
	const { domain, ticks, decimals } = linearAxis(lowest, highest);
	const [from, to] = domain;
	return {
		scale: { type: 'linear' as const, domain: [from, to], nice: false, zero: false },
		axis: {
			values: [...ticks],
			labelExpr: `(datum.value < 0 ? '\u2212' : '') + format(abs(datum.value), '.${decimals}f')`,
			grid: true,
			gridColor: theme.grid.color,
			gridWidth: theme.grid.width
		},
		share: (value: number) => (value - from) / (to - from)
	};
}

/** The tinted band where both limits stand. */
function areaLayer(lower: string, upper: string, theme: ChartTheme): Layer {
	return {
		transform: [{ filter: `isValid(datum.${lower}) && isValid(datum.${upper})` }],
		mark: { type: 'area', color: theme.band, opacity: 1, clip: true },
		encoding: { y: { field: lower, type: 'quantitative' }, y2: { field: upper } }
	};
}

function curveLayer(column: string, stroke: ChartTheme['minimum']): Layer {
	return {
		mark: { type: 'line', clip: true, invalid: 'break-paths-show-domains', ...strokeMark(stroke) },
		encoding: { y: { field: column, type: 'quantitative' } }
	};
}

const curveLayers = (columns: readonly ('maximum' | 'typical' | 'minimum')[], theme: ChartTheme) =>
	columns.map((column) => curveLayer(column, theme[column]));

interface SweepRow {
	readonly name: string;
	readonly isOutside: boolean;
	readonly bias: number;
	readonly value: number;
}

function sweepRows(
	sweeps: readonly DeviceSweep[],
	isDrawn: (point: { readonly bias: number }) => boolean
): SweepRow[] {
	return sweeps.flatMap(({ name, isOutside, readings }) =>
		readings
			.filter(isDrawn)
			.map(({ bias, capacitance }) => ({ name, isOutside, bias, value: capacitance }))
	);
}

/** The sweeps as deviation from the median, at the biases where there is one. */
function deviationRows(
	{ band, sweeps }: BandChartData,
	isDrawn: (point: { readonly bias: number }) => boolean
): SweepRow[] {
	const typical = new Map(band.map((point) => [point.bias, point.typical]));
	return sweepRows(sweeps, isDrawn).flatMap((row) => {
		const at = typical.get(row.bias);
		return at === undefined ? [] : [{ ...row, value: (row.value / at - 1) * 100 }];
	});
}

/** Over the band, so that they are seen in both colour schemes; those that leave it last. */
function sweepLayers(rows: readonly SweepRow[], what: string, theme: ChartTheme): Layer[] {
	return [false, true].flatMap((isOutside): Layer[] => {
		const values = rows.filter((row) => row.isOutside === isOutside);
		if (values.length === 0) return [];
		return [
			{
				name: `${what}-${isOutside ? 'outside' : 'inside'}`,
				data: { values },
				mark: {
					type: 'line',
					clip: true,
					...strokeMark(isOutside ? theme.outside : theme.sweep)
				},
				encoding: {
					y: { field: 'value', type: 'quantitative' },
					detail: { field: 'name', type: 'nominal' }
				}
			}
		];
	});
}

/** `max`, `typ`, `min` where the curves end, moved apart so that none covers another. */
function endLabels(
	last: BandPoint,
	share: (value: number) => number,
	frame: Panels,
	height: number,
	theme: ChartTheme
): Layer[] {
	const named = (['maximum', 'typical', 'minimum'] as const).flatMap((column) => {
		const value = last[column];
		return value === null || value <= 0 ? [] : [{ column, y: (1 - share(value)) * height }];
	});
	const places = placeApart(
		named.map(({ y }) => y),
		theme.labelSize * 1.15,
		height
	);
	const words = { maximum: 'max', typical: 'typ', minimum: 'min' } as const;
	return named.flatMap(({ column }, at) =>
		labelLayers(
			[{ text: words[column], size: theme.labelSize, style: 'upright', drop: 0 }],
			{
				x: frame.width + theme.labelSize * 0.5,
				y: (places[at] ?? 0) + theme.labelSize * 0.33,
				align: 'left'
			},
			column === 'typical' ? theme.typical.color : theme.ink
		)
	);
}
