import type { LetterSymbol } from '../core/characteristics/symbol';
import { symbolPieces } from './chartParts';
import { textWidth } from './textWidth';

/** A point in pt of the drawing: x to the right, y downwards. */
export type SketchPoint = readonly [number, number];

export type SketchStep =
	| { readonly to: 'move' | 'line'; readonly at: SketchPoint }
	| {
			readonly to: 'curve';
			readonly by: SketchPoint;
			readonly then: SketchPoint;
			readonly at: SketchPoint;
	  }
	| { readonly to: 'close' };

/** Shades of the one ink: paper covers what lies below, `tint` is 21 % black. */
export type Shade = 'ink' | 'paper' | 'tint';

export interface SketchPath {
	readonly kind: 'path';
	readonly steps: readonly SketchStep[];
	readonly fill: Shade | null;
	/** Width in pt; `null` for an area without a line. */
	readonly stroke: { readonly width: number; readonly dash: readonly number[] } | null;
}

export interface SketchText {
	readonly kind: 'text';
	readonly text: string;
	readonly at: SketchPoint;
	readonly size: number;
	readonly style: 'upright' | 'italic' | 'bold';
}

export type SketchMark = SketchPath | SketchText;

/** A line drawing in one ink, which the screen and the PDF show alike. */
export interface Sketch {
	readonly width: number;
	readonly height: number;
	readonly marks: readonly SketchMark[];
}

export interface Look {
	readonly width?: number;
	readonly dash?: readonly number[];
	readonly fill?: Shade;
}

const pathOf = (steps: readonly SketchStep[], look: Look): SketchPath => ({
	kind: 'path',
	steps,
	fill: look.fill ?? null,
	stroke: look.width === undefined ? null : { width: look.width, dash: look.dash ?? [] }
});

/** Straight lines from point to point. */
export function polyline(points: readonly SketchPoint[], look: Look, isClosed = false): SketchPath {
	const steps = points.map((at, index): SketchStep => ({ to: index === 0 ? 'move' : 'line', at }));
	return pathOf(isClosed ? [...steps, { to: 'close' }] : steps, look);
}

/** A part of a circle, clockwise from one angle to the other; angles in quarter turns from the right. */
export function arc(
	centre: SketchPoint,
	radius: number,
	[from, to]: readonly [number, number],
	look: Look
): SketchPath {
	const quarters = Math.max(1, Math.ceil(to - from - 1e-9));
	const step = ((to - from) / quarters) * (Math.PI / 2);
	const handle = (4 / 3) * Math.tan(step / 4) * radius;
	const on = (angle: number): SketchPoint => [
		centre[0] + radius * Math.cos(angle),
		centre[1] + radius * Math.sin(angle)
	];
	const start = (from * Math.PI) / 2;
	const steps: SketchStep[] = [{ to: 'move', at: on(start) }];
	for (let part = 0; part < quarters; part++) {
		const [a, b] = [start + part * step, start + (part + 1) * step];
		const [p, q] = [on(a), on(b)];
		steps.push({
			to: 'curve',
			by: [p[0] - handle * Math.sin(a), p[1] + handle * Math.cos(a)],
			then: [q[0] + handle * Math.sin(b), q[1] - handle * Math.cos(b)],
			at: q
		});
	}
	return pathOf(to - from >= 4 ? [...steps, { to: 'close' }] : steps, look);
}

export const circle = (centre: SketchPoint, radius: number, look: Look): SketchPath =>
	arc(centre, radius, [0, 4], look);

/** Words at a place; `align` says which of their ends stands there. */
export function words(
	text: string,
	at: SketchPoint,
	look: {
		readonly size: number;
		readonly style?: SketchText['style'];
		readonly align?: 'left' | 'middle' | 'right';
	}
): SketchText {
	const { size, style = 'upright', align = 'left' } = look;
	const width = textWidth(text, size, style === 'italic' ? 'italic' : 'upright');
	const shift = { left: 0, middle: 0.5, right: 1 }[align] * width;
	return { kind: 'text', text, at: [at[0] - shift, at[1]], size, style };
}

/** A letter symbol with its subscript and what follows it, at a place. */
export function symbolWords(
	symbol: LetterSymbol,
	at: SketchPoint,
	look: {
		readonly size: number;
		readonly align?: 'left' | 'middle' | 'right';
		readonly rest?: string;
	}
): SketchText[] {
	const pieces = symbolPieces(symbol, look.rest ?? '', look.size);
	const widths = pieces.map(({ text, size, style }) => textWidth(text, size, style));
	const total = widths.reduce((sum, width) => sum + width, 0);
	let x = at[0] - { left: 0, middle: 0.5, right: 1 }[look.align ?? 'left'] * total;
	return pieces.map(({ text, size, style, drop }, index) => {
		const placed = words(text, [x, at[1] + drop], { size, style });
		x += widths[index] ?? 0;
		return placed;
	});
}

/** Width of a letter symbol as `symbolWords` sets it. */
export const symbolWidth = (symbol: LetterSymbol, size: number, rest = ''): number =>
	symbolPieces(symbol, rest, size).reduce(
		(sum, piece) => sum + textWidth(piece.text, piece.size, piece.style),
		0
	);

interface Extent {
	readonly left: number;
	readonly top: number;
	readonly right: number;
	readonly bottom: number;
}

/** The rectangle that marks need, line widths left out. */
export function extentOf(marks: readonly SketchMark[]): Extent {
	const points = marks.flatMap((mark): SketchPoint[] =>
		mark.kind === 'text' ? textCorners(mark) : mark.steps.flatMap(pointsOf)
	);
	const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
	return {
		left: Math.min(...xs),
		top: Math.min(...ys),
		right: Math.max(...xs),
		bottom: Math.max(...ys)
	};
}

function textCorners({ text, at, size, style }: SketchText): SketchPoint[] {
	const width = textWidth(text, size, style === 'italic' ? 'italic' : 'upright');
	return [
		[at[0], at[1] - size * 0.7],
		[at[0] + width, at[1] + size * 0.2]
	];
}

function pointsOf(step: SketchStep): SketchPoint[] {
	switch (step.to) {
		case 'move':
		case 'line':
			return [step.at];
		case 'curve':
			return [step.by, step.then, step.at];
		case 'close':
			return [];
		default:
			return step satisfies never;
	}
}

/** The same marks elsewhere. */
export function moveMarks(marks: readonly SketchMark[], [dx, dy]: SketchPoint): SketchMark[] {
	const moved = ([x, y]: SketchPoint): SketchPoint => [x + dx, y + dy];
	const movedStep = (step: SketchStep): SketchStep => {
		switch (step.to) {
			case 'move':
			case 'line':
				return { ...step, at: moved(step.at) };
			case 'curve':
				return { ...step, by: moved(step.by), then: moved(step.then), at: moved(step.at) };
			case 'close':
				return step;
			default:
				return step satisfies never;
		}
	};
	return marks.map((mark) =>
		mark.kind === 'text'
			? { ...mark, at: moved(mark.at) }
			: { ...mark, steps: mark.steps.map(movedStep) }
	);
}

/** A margin that keeps thick lines inside the drawing. */
const MARGIN = 1;

/** Marks as a drawing that begins at its upper left corner. */
export function sketchOf(marks: readonly SketchMark[]): Sketch {
	if (marks.length === 0) return { width: 0, height: 0, marks };
	const { left, top, right, bottom } = extentOf(marks);
	return {
		width: right - left + 2 * MARGIN,
		height: bottom - top + 2 * MARGIN,
		marks: moveMarks(marks, [MARGIN - left, MARGIN - top])
	};
}
