import { BASIS_MARKS, type Basis } from '../../../core/limits/basis';
import type { Box, Tag, TextPiece } from './box';
import type { Block, Row } from './flow';
import { MEASURE, mm } from './paper';
import { STYLES, RULES } from './styles';
import type { Structure } from './structure';
import {
	breakLines,
	lineBoxes,
	oneLine,
	paragraphBoxes,
	piece,
	textSpan,
	type Span,
	type TextStyle
} from './typeset';

/** A column: text from its left edge, or numbers on a decimal axis, or a mark in its middle. */
export interface Column {
	readonly x: number;
	readonly width: number;
	readonly set: 'text' | 'decimal' | 'centre' | 'right';
	/** Head; an empty one leaves the column without. */
	readonly head: readonly Span[];
	/** Distance of the decimal axis from the left edge. */
	readonly axis?: number;
	/** Numbers of the column are set in this style; the body's by default. */
	readonly style?: TextStyle;
	readonly indent?: number;
}

/** Where the integer part of a number ends, from the column's left edge, and the middle of its head. */
export const AXIS = mm(6.6);
const HEAD_MIDDLE = mm(6.9);

/** Row pitch, first baseline below the row's rule, and height of a table head, in pt. */
export const ROW = { height: 13.5, baseline: 9.4 };
const HEAD = { height: 12.5, baseline: 8.3 };

export type Cell =
	| { readonly kind: 'text'; readonly spans: readonly Span[] }
	| { readonly kind: 'number'; readonly text: string | null; readonly mark?: TextPiece | null }
	/** A basis mark; with `leadsTo` a link to where its terms stand. */
	| { readonly kind: 'basis'; readonly basis: Basis | null; readonly leadsTo?: string | undefined }
	| { readonly kind: 'empty' }
	/** Covered by the cell of a row above. */
	| { readonly kind: 'covered' };

export const textCell = (text: string, style: TextStyle): Cell => ({
	kind: 'text',
	spans: text === '' ? [] : [textSpan(text, style)]
});

/** Column heads on one baseline, above a rule. */
export function headBlock(
	columns: readonly Column[],
	place: { readonly structure: Structure; readonly table: number; readonly width?: number }
): Block {
	const row = place.structure.add('TR', place.table);
	const boxes = columns.flatMap((column) => {
		const tag = place.structure.add('TH', row, { scope: 'Column' });
		return headBoxes(column, tag, HEAD.baseline);
	});
	return {
		height: HEAD.height,
		boxes: [
			...boxes,
			{
				kind: 'rule',
				tag: null,
				from: [0, HEAD.height],
				to: [place.width ?? MEASURE, HEAD.height],
				weight: RULES.table
			}
		]
	};
}

/** One column's head at a baseline. */
export function headBoxes(column: Column, tag: Tag, y: number): Box[] {
	const line = oneLine(column.head);
	switch (column.set) {
		case 'text':
			return lineBoxes(line, { tag, x: column.x + (column.indent ?? 0), y });
		case 'decimal':
			return lineBoxes(line, { tag, x: column.x + HEAD_MIDDLE, y, align: 'centre' });
		case 'centre':
			return lineBoxes(line, { tag, x: column.x + column.width / 2, y, align: 'centre' });
		case 'right':
			return lineBoxes(line, { tag, x: column.x + column.width, y, align: 'right' });
		default:
			return column.set satisfies never;
	}
}

export interface RowDetails {
	readonly structure: Structure;
	readonly table: number;
	/** Index of the cell that names the row. */
	readonly header: number;
	/** Rows a cell covers, by index. */
	readonly spans?: Readonly<Record<number, number>>;
	/** Columns a cell covers, by index. */
	readonly columnSpans?: Readonly<Record<number, number>>;
	readonly isChanged?: boolean;
	/** State of a slot on a proof, and where its box begins. */
	readonly state?: { readonly label: StateLabel; readonly x: number } | null;
	readonly rule: Row['rule'];
	readonly keepWithNext?: boolean;
}

/** Words in a box on a proof: solid where there is a value, dashed where there is none. */
export interface StateLabel {
	readonly text: string;
	readonly isDashed: boolean;
}

/** The rule above an ordinary row. */
export const rowRule = (from = 0): Row['rule'] => ({ from, weight: RULES.row, isGrey: true });
export const strongRule = (from = 0): Row['rule'] => ({ from, weight: RULES.table, isGrey: false });

/** A row of cells on one first baseline. */
export function rowBlock(
	columns: readonly Column[],
	cells: readonly Cell[],
	details: RowDetails
): Row {
	const { structure } = details;
	const row = structure.add('TR', details.table);
	const boxes: Box[] = [];
	let lineCount = 1;
	let first: number | null = null;

	columns.forEach((column, at) => {
		const cell = cells[at] ?? { kind: 'empty' };
		if (cell.kind === 'covered') return;
		const rowSpan = details.spans?.[at] ?? 1;
		const columnSpan = details.columnSpans?.[at] ?? 1;
		const tag = structure.add(at === details.header ? 'TH' : 'TD', row, {
			...(at === details.header && { scope: 'Row' as const }),
			...(rowSpan > 1 && { rowSpan }),
			...(columnSpan > 1 && { columnSpan })
		});
		first ??= tag;
		if (cell.kind === 'text') {
			const lines = breakLines(cell.spans, column.width - (column.indent ?? 0));
			lineCount = Math.max(lineCount, lines.length);
			boxes.push(...textBoxes(lines, column, tag));
		} else boxes.push(...valueBoxes(cell, column, tag, structure));
	});

	const height = ROW.height + (lineCount - 1) * STYLES.body.leading;
	if (details.state) boxes.push(...stateBoxes(details.state.label, details.state.x, ROW.baseline));
	if (details.isChanged) {
		const parent = first ?? row;
		boxes.push(changeBar(structure.add('Span', parent, { actualText: 'changed' }), 0, height));
	}
	return {
		height,
		boxes,
		rule: details.rule,
		...(details.keepWithNext && { keepWithNext: true })
	};
}

function textBoxes(lines: ReturnType<typeof breakLines>, column: Column, tag: Tag): Box[] {
	const x = column.x + (column.indent ?? 0);
	return column.set === 'right'
		? lines.flatMap((line, at) =>
				lineBoxes(line, {
					tag,
					x: column.x + column.width,
					y: ROW.baseline + at * STYLES.body.leading,
					align: 'right'
				})
			)
		: paragraphBoxes(lines, { tag, x, y: ROW.baseline }, STYLES.body.leading);
}

function valueBoxes(
	cell: Extract<Cell, { kind: 'number' | 'basis' | 'empty' }>,
	column: Column,
	tag: number,
	structure: Structure
): Box[] {
	switch (cell.kind) {
		case 'empty':
			return [];
		case 'basis':
			return cell.basis === null
				? []
				: lineBoxes(oneLine([basisCellSpan(cell.basis, cell.leadsTo, tag, structure)]), {
						tag,
						x: column.x + column.width / 2,
						y: ROW.baseline,
						align: 'centre'
					});
		case 'number':
			return numberBoxes(cell.text, cell.mark ?? null, column, tag);
		default:
			return cell satisfies never;
	}
}

function basisCellSpan(
	basis: Basis,
	leadsTo: string | undefined,
	cell: number,
	structure: Structure
): Span {
	const span = basisSpan(basis);
	return leadsTo === undefined
		? span
		: { ...span, link: { to: leadsTo, tag: structure.add('Link', cell) } };
}

/** The basis letter; `typ` stands in the small running size. */
export const basisSpan = (basis: Basis): Span =>
	textSpan(BASIS_MARKS[basis], basis === 'typical' ? STYLES.basisTypical : STYLES.basis);

/** A number whose integer part ends at the column's axis; an en dash in the units place for none. */
function numberBoxes(text: string | null, mark: TextPiece | null, column: Column, tag: Tag): Box[] {
	const { face, size } = column.style ?? STYLES.body;
	const plain = { face, size, kerning: false } as const;
	const number = piece(text ?? '\u2013', plain);
	const whole = piece(text === null ? '0' : integerPart(text), plain);
	const axis = column.x + (column.axis ?? AXIS);
	const middle = text === null ? (whole.width - number.width) / 2 : 0;
	return [
		{
			kind: 'text',
			tag,
			x: axis - whole.width + middle,
			y: ROW.baseline,
			pieces: text !== null && mark ? [number, mark] : [number]
		}
	];
}

const integerPart = (text: string) => text.split('.')[0] ?? text;

/** The axis of a column: at its usual place, or further right where a long integer part needs it. */
export function axisFor(texts: readonly (string | null)[], style: TextStyle = STYLES.body): number {
	const { face, size } = style;
	const widths = texts.map((text) =>
		text === null ? 0 : piece(integerPart(text), { face, size, kerning: false }).width
	);
	return Math.max(AXIS, ...widths);
}

/** Thin spaces between thousands from five figures on; a column that has such a number has them throughout. */
export function groupThousands(texts: readonly (string | null)[]): (string | null)[] {
	const isGrouped = texts.some((text) => text !== null && /\d{5}/.test(integerPart(text)));
	if (!isGrouped) return [...texts];
	return texts.map((text) => {
		if (text === null) return null;
		const whole = integerPart(text);
		return whole.replaceAll(/\B(?=(\d{3})+$)/g, '\u00a0') + text.slice(whole.length);
	});
}

/** A change bar left of the text, in the margin. */
export const changeBar = (tag: Tag, from: number, to: number): Box => ({
	kind: 'rule',
	tag,
	from: [-mm(4), from],
	to: [-mm(4), to],
	weight: 1.5
});

/** A word in a box at a baseline. */
export function stateBoxes(label: StateLabel, x: number, y: number): Box[] {
	const line = oneLine([textSpan(label.text, STYLES.stateBox)]);
	return [
		{
			kind: 'rectangle',
			tag: null,
			x,
			y: y - 7,
			width: line.width + 7,
			height: 9.2,
			stroke: 'black',
			weight: 0.5,
			...(label.isDashed && { dash: [1.2, 1.2] })
		},
		...lineBoxes(line, { tag: null, x: x + 3.5, y: y - 0.2 })
	];
}

export const stateBoxWidth = (label: StateLabel) =>
	oneLine([textSpan(label.text, STYLES.stateBox)]).width + 7;
