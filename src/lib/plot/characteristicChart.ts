import type { TopLevelSpec } from 'vega-lite';
import type { ChartCurve, ChartLimit } from '../core/datasheet/document';
import type { ChartAxis } from '../core/template/template';
import { chartConfig, lineAxis } from './chartAxes';
import {
	fixed,
	labelLayers,
	labelPieces,
	labelPlate,
	leaderLabel,
	ONE_ROW,
	piecesWidth,
	strokeMark,
	symbolPieces,
	type Layer,
	type Place
} from './chartParts';
import type { ChartTheme, Stroke } from './chartTheme';
import { linearAxis } from './linearAxis';
import { logAxis, wholeDigitAbove, wholeDigitBelow } from './logAxis';
import { placeLabels } from './placeLabels';

export interface CharacteristicChartData {
	readonly x: ChartAxis;
	readonly y: ChartAxis;
	readonly curves: readonly ChartCurve[];
	readonly limits: readonly ChartLimit[];
}

/** Where nobody measured, a curve is dashed at its own weight. */
const NOT_MEASURED = [3.2, 2.2] as const;
/** A guaranteed value in a typical chart: a bar, and an arrow to where the devices lie. */
const LIMIT = { width: 12, weight: 1, arrow: 8 };

/**
 * Curves over linear or logarithmic axes, named at the lines. A curve on a logarithmic axis leaves
 * out what isn't positive.
 *
 * @returns `null` when no curve has two points on the axes
 */
export function characteristicChart(
	data: CharacteristicChartData,
	theme: ChartTheme
): TopLevelSpec | null {
	const curves = data.curves
		.map((curve) => ({ ...curve, points: curve.points.filter((point) => hasPlace(point, data)) }))
		.filter(({ points }) => points.length > 1);
	if (curves.length === 0) return null;
	const limits = data.limits.filter(({ x, y }) => hasPlace([x, y], data));
	const points = [
		...curves.flatMap((curve) => curve.points),
		...limits.map(({ x, y }): [number, number] => [x, y])
	];
	const x = scaleOf(
		data.x,
		points.map(([value]) => value),
		theme
	);
	const y = scaleOf(
		data.y,
		points.map(([, value]) => value),
		theme
	);
	const frame = frameOf(theme);
	const place = ([atX, atY]: readonly [number, number]): Place => ({
		x: x.share(atX) * frame.width,
		y: (1 - y.share(atY)) * frame.height
	});
	const drawn = curves.map((curve) => curve.points.map(place));
	return {
		$schema: 'https://vega.github.io/schema/vega-lite/v6.json',
		description: describeChart(data),
		background: theme.paper,
		padding: { left: theme.axisSpace, top: frame.top, right: frame.right, bottom: frame.bottom },
		autosize: { type: 'none' },
		width: frame.width,
		height: frame.height,
		config: chartConfig(theme),
		data: { values: [] },
		encoding: {
			x: { field: 'x', type: 'quantitative', scale: x.scale, axis: x.axis, title: null },
			y: { field: 'y', type: 'quantitative', scale: y.scale, axis: y.axis, title: null }
		},
		layer: [
			...curves.map((curve, at) => curveLayer(curve, at === 0 ? theme.typical : theme.further)),
			...curveNames(curves, drawn, frame, theme),
			...limits.flatMap((limit) =>
				limitLayers(limit, place([limit.x, limit.y]), drawn.flat(), theme)
			),
			...axisNames(data, frame, theme)
		]
	};
}

/** In words, for who can't see it: axes, curves with their ends. */
export function describeChart({ x, y, curves }: CharacteristicChartData): string {
	const axis = ({ symbol, unit, scale }: ChartAxis) =>
		`${symbol.quantity}${symbol.subscript === undefined ? '' : `_${symbol.subscript}`} in ${unit}, ${scale === 'log' ? 'logarithmic' : 'linear'}`;
	const ends = curves.map(({ label, points }) => {
		const [first, last] = [points[0], points.at(-1)];
		return `${label}: ${first?.[1]} at ${first?.[0]} to ${last?.[1]} at ${last?.[0]}`;
	});
	return `Chart of ${axis(y)}, against ${axis(x)}. ${ends.join('; ')}.`;
}

const hasPlace = (
	[x, y]: readonly [number, number],
	axes: Pick<CharacteristicChartData, 'x' | 'y'>
) => (axes.x.scale === 'linear' || x > 0) && (axes.y.scale === 'linear' || y > 0);

function frameOf(theme: ChartTheme) {
	const size = theme.axisSize;
	const around = { top: size * 1.65, right: size * 0.9, bottom: size * 3 };
	return {
		...around,
		width: theme.width - theme.axisSpace - around.right,
		height: theme.height - around.top - around.bottom
	};
}
type Frame = ReturnType<typeof frameOf>;

function scaleOf(axis: ChartAxis, values: readonly number[], theme: ChartTheme) {
	const [lowest, highest] = [Math.min(...values), Math.max(...values)];
	if (axis.scale === 'log') {
		const lines = logAxis(wholeDigitBelow(lowest), wholeDigitAbove(highest));
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
			labelExpr: `(datum.value < 0 ? '\u2212' : '') + replace(format(abs(datum.value), ',.${decimals}f'), ',', '\u00a0')`,
			grid: true,
			gridColor: theme.grid.color,
			gridWidth: theme.grid.width
		},
		share: (value: number) => (value - from) / (to - from)
	};
}

function curveLayer({ points, isMeasured }: ChartCurve, stroke: Stroke): Layer {
	return {
		data: { values: points.map(([x, y]) => ({ x, y })) },
		mark: {
			type: 'line',
			interpolate: 'monotone',
			...strokeMark(isMeasured ? stroke : { ...stroke, dash: NOT_MEASURED })
		}
	};
}

function curveNames(
	curves: readonly ChartCurve[],
	drawn: readonly (readonly Place[])[],
	frame: Frame,
	theme: ChartTheme
): Layer[] {
	const named = curves.map(({ label, isMeasured }, at) => {
		const pieces = labelPieces(isMeasured ? label : `${label}, not measured`, theme.labelSize);
		return { pieces, points: drawn[at] ?? [], width: piecesWidth(pieces) };
	});
	const spots = placeLabels(named, frame, theme.labelSize);
	return named.flatMap(({ pieces }, at) => {
		const spot = spots[at];
		return spot === undefined ? [] : leaderLabel(pieces, spot, theme);
	});
}

function limitLayers(
	{ side, label }: ChartLimit,
	at: Place,
	curves: readonly Place[],
	theme: ChartTheme
): Layer[] {
	const pieces = labelPieces(label, theme.labelSize);
	const width = piecesWidth(pieces);
	const aside = LIMIT.width / 2 + 4;
	// Beside the bar where fewer curves run: their points to the left and to the right of it.
	const near = (from: number, to: number) =>
		curves.filter(({ x, y }) => x >= from && x <= to && Math.abs(y - at.y) < theme.labelSize * 2)
			.length;
	const isLeft = near(at.x - aside - width, at.x) < near(at.x, at.x + aside + width);
	const text = {
		x: isLeft ? at.x - aside - width : at.x + aside,
		y: at.y + theme.labelSize * 0.33
	};
	const towards = side === 'maximum' ? 1 : -1;
	const tip = at.y + towards * LIMIT.arrow;
	const line = (from: Place, to: Place, width: number): Layer => ({
		data: ONE_ROW,
		mark: { type: 'rule', stroke: theme.ink, strokeWidth: width },
		encoding: { ...fixed(from), x2: { value: to.x }, y2: { value: to.y } }
	});
	return [
		line(
			{ x: at.x - LIMIT.width / 2, y: at.y },
			{ x: at.x + LIMIT.width / 2, y: at.y },
			LIMIT.weight
		),
		line(at, { x: at.x, y: tip - towards * 3 }, theme.frame.width),
		{
			data: ONE_ROW,
			mark: {
				type: 'point',
				shape: side === 'maximum' ? 'triangle-down' : 'triangle-up',
				filled: true,
				size: 12,
				color: theme.ink
			},
			encoding: fixed({ x: at.x, y: tip - towards * 2 })
		},
		labelPlate(text, width, theme),
		...labelLayers(pieces, { ...text, align: 'left' }, theme.ink)
	];
}

/** The y axis is named above its left end, the x axis below its right end. */
function axisNames({ x, y }: CharacteristicChartData, frame: Frame, theme: ChartTheme): Layer[] {
	const size = theme.axisSize;
	const named = (axis: ChartAxis) =>
		symbolPieces(axis.symbol, axis.unit === '' ? '' : ` in ${axis.unit}`, size);
	return [
		...labelLayers(named(y), { x: 0, y: -size * 0.55, align: 'left' }, theme.ink),
		...labelLayers(
			named(x),
			{ x: frame.width, y: frame.height + size * 2.55, align: 'right' },
			theme.ink
		)
	];
}
