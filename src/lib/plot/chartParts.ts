import type { Field } from 'vega-lite/types_unstable/channeldef.js';
import type { LayerSpec } from 'vega-lite/types_unstable/spec/index.js';
import type { LetterSymbol } from '../core/characteristics/symbol';
import { symbolRuns } from '../core/datasheet/symbolRuns';
import type { ChartTheme, Stroke } from './chartTheme';
import { textWidth } from './textWidth';

/** One layer of a panel. */
export type Layer = LayerSpec<Field>['layer'][number];

/** A place inside a panel, from its upper left corner, in the unit of the chart. */
export interface Place {
	readonly x: number;
	readonly y: number;
}

/** A piece of a label: a chart's text knows no subscripts, so that each piece is a mark of its own. */
export interface LabelPiece {
	readonly text: string;
	readonly size: number;
	readonly style: 'upright' | 'italic';
	/** Distance below the baseline. */
	readonly drop: number;
}

/** A mark that stands for nothing in the data has one empty row. */
export const ONE_ROW = { values: [{}] };

/** Fixed places as an encoding: a place given to the mark would lose to the panel's own channels. */
export const fixed = (place: Place) => ({ x: { value: place.x }, y: { value: place.y } });

const fixedSpan = (from: Place, to: Place) => ({
	...fixed(from),
	x2: { value: to.x },
	y2: { value: to.y }
});

/** Vega's names for a stroke. */
export const strokeMark = (stroke: Stroke) => ({
	stroke: stroke.color,
	strokeWidth: stroke.width,
	...(stroke.dash && { strokeDash: [...stroke.dash] })
});

/** `C_tot in pF` as pieces: italic quantity, upright subscript at 0.74 of the size, then the rest. */
export function symbolPieces(symbol: LetterSymbol, rest: string, size: number): LabelPiece[] {
	const small = size * 0.74;
	return [
		{ text: symbol.quantity, size, style: 'italic', drop: 0 },
		...(symbol.subscript === undefined
			? []
			: [{ text: symbol.subscript, size: small, style: 'upright' as const, drop: small * 0.26 }]),
		...(rest === '' ? [] : [{ text: rest, size, style: 'upright' as const, drop: 0 }])
	];
}

const pieceWidth = (piece: LabelPiece) => textWidth(piece.text, piece.size, piece.style);

/** Width of pieces side by side. */
export const piecesWidth = (pieces: readonly LabelPiece[]) =>
	pieces.reduce((sum, piece) => sum + pieceWidth(piece), 0);

/** `typical, T_j = 25 °C` as pieces: symbols set as symbols. */
export function labelPieces(text: string, size: number): LabelPiece[] {
	return symbolRuns(text).flatMap((run): LabelPiece[] =>
		run.kind === 'symbol'
			? symbolPieces(run.symbol, '', size)
			: [{ text: run.text, size, style: 'upright', drop: 0 }]
	);
}

/** A place given by columns of the data, in the unit of the chart. */
const placed = {
	x: { field: 'x', type: 'quantitative', scale: null },
	y: { field: 'y', type: 'quantitative', scale: null }
} as const;

/**
 * Text at a fixed place of a panel, its pieces side by side: one layer with a row a piece, because
 * each layer costs the chart library as much as a curve.
 */
export function labelLayers(
	pieces: readonly LabelPiece[],
	at: Place & { readonly align: 'left' | 'right' },
	color: string
): Layer[] {
	const total = piecesWidth(pieces);
	let x = at.align === 'left' ? at.x : at.x - total;
	const values = pieces.map((piece) => {
		const left = x + textWidth(/^ */.exec(piece.text)?.[0] ?? '', piece.size);
		x += pieceWidth(piece);
		return {
			x: left,
			y: at.y + piece.drop,
			text: piece.text.trimStart(),
			size: piece.size,
			style: piece.style === 'italic' ? 'italic' : 'normal'
		};
	});
	return [
		{
			data: { values },
			mark: {
				type: 'text',
				align: 'left',
				baseline: 'alphabetic',
				fontSize: { expr: 'datum.size' },
				fontStyle: { expr: 'datum.style' },
				color
			},
			encoding: { ...placed, text: { field: 'text', type: 'nominal' } }
		}
	];
}

/** A plate of paper behind a label, a little larger than its text, that keeps the grid out. */
export function labelPlate({ x, y }: Place, width: number, theme: ChartTheme): Layer {
	const size = theme.labelSize;
	const margin = size * 0.15;
	return {
		data: ONE_ROW,
		mark: { type: 'rect', color: theme.paper, opacity: 1 },
		encoding: fixedSpan(
			{ x: x - margin, y: y - size * 0.75 - margin },
			{ x: x + width + margin, y: y + size * 0.22 + margin }
		)
	};
}

/** A label beside a curve: a thin leader from the curve, and a plate that keeps the grid out. */
export function leaderLabel(
	text: string | readonly LabelPiece[],
	place: { readonly curve: Place; readonly label: Place; readonly align: 'left' | 'right' },
	theme: ChartTheme
): Layer[] {
	const { curve, label, align } = place;
	const size = theme.labelSize;
	const pieces: readonly LabelPiece[] =
		typeof text === 'string' ? [{ text, size, style: 'upright', drop: 0 }] : text;
	const width = piecesWidth(pieces);
	const left = align === 'left' ? label.x : label.x - width;
	const margin = size * 0.15;
	return [
		{
			data: ONE_ROW,
			mark: { type: 'rule', ...strokeMark(theme.leader) },
			encoding: fixedSpan(curve, {
				x: align === 'left' ? left - margin * 2 : left + width + margin * 2,
				y: label.y - size * 0.33
			})
		},
		labelPlate({ x: left, y: label.y }, width, theme),
		...labelLayers(pieces, { ...label, x: left, align: 'left' }, theme.ink)
	];
}
