import type { Bounds, DimensionLine } from '../core/outline/view';
import { polyline, symbolWidth, symbolWords, type SketchMark, type SketchPoint } from './sketch';

/** In pt: gap before an extension line, how far it overruns, arrowheads, and letters. */
const GAP = 1.2;
const OVERRUN = 2.2;
const ARROW = { length: 4.2, width: 2.3 };
const LETTER = 8.2;
/** Distance of the first dimension line from the view, and of each further one: letters stand upright. */
const FIRST = 13;
const STEP = { along: 13, across: 17 };
/** A dimension narrower than this has its arrows outside. */
const NARROW = 17;
const TAIL = 9;
const THIN = { width: 0.25 };

/**
 * A dimension as marks: extension lines, the line with its arrowheads, the letter on a gap.
 *
 * @param scale pt per mm of the package
 */
export function dimensionMarks(
	dimension: DimensionLine,
	bounds: Bounds,
	scale: number
): SketchMark[] {
	const isAlongX = dimension.side === 'above' || dimension.side === 'below';
	const away = dimension.side === 'above' || dimension.side === 'left' ? -1 : 1;
	const edge = { above: bounds.top, below: bounds.bottom, left: bounds.left, right: bounds.right }[
		dimension.side
	];
	const line =
		edge * scale + away * (FIRST + (dimension.level - 1) * (isAlongX ? STEP.along : STEP.across));
	const [from, to] = [dimension.from * scale, dimension.to * scale];
	const reach = dimension.reach.map((place) => place * scale);
	/** Along the dimension first, across it second, whichever way it lies. */
	const point = (along: number, across: number): SketchPoint =>
		isAlongX ? [along, across] : [across, along];

	const extensions = [from, to].map((along, at) =>
		polyline(
			[point(along, (reach[at] ?? 0) + away * GAP), point(along, line + away * OVERRUN)],
			THIN
		)
	);
	const isNarrow = to - from < NARROW;
	const arrow = (tip: number, pointing: 1 | -1) =>
		polyline(
			[
				point(tip, line),
				point(tip - pointing * ARROW.length, line - ARROW.width / 2),
				point(tip - pointing * ARROW.length, line + ARROW.width / 2)
			],
			{ fill: 'ink' },
			true
		);
	const strokes = isNarrow
		? [
				polyline([point(from - TAIL, line), point(from, line)], THIN),
				polyline([point(to, line), point(to + TAIL, line)], THIN),
				arrow(from, 1),
				arrow(to, -1)
			]
		: [polyline([point(from, line), point(to, line)], THIN), arrow(from, -1), arrow(to, 1)];
	return [...extensions, ...strokes, ...letterMarks(dimension, { from, to, line, isNarrow })];
}

interface LetterPlace {
	readonly from: number;
	readonly to: number;
	readonly line: number;
	readonly isNarrow: boolean;
}

/** The letter in the middle of its line on a plate of paper, or beyond the end of a narrow one. */
function letterMarks({ symbol, side }: DimensionLine, place: LetterPlace): SketchMark[] {
	const { from, to, line, isNarrow } = place;
	const isAlongX = side === 'above' || side === 'below';
	const width = symbolWidth(symbol, LETTER);
	const letter = (x: number, y: number) =>
		symbolWords(symbol, [x, y], { size: LETTER, align: 'middle' });
	if (isNarrow)
		return isAlongX
			? letter(to + TAIL + 3 + width / 2, line + LETTER * 0.33)
			: letter(line, from - TAIL - 3);
	const middle = (from + to) / 2;
	const [x, y] = isAlongX ? [middle, line] : [line, middle];
	const plate = polyline(
		[
			[x - width / 2 - 2, y - LETTER * 0.55],
			[x + width / 2 + 2, y - LETTER * 0.55],
			[x + width / 2 + 2, y + LETTER * 0.5],
			[x - width / 2 - 2, y + LETTER * 0.5]
		],
		{ fill: 'paper' },
		true
	);
	return [plate, ...letter(x, y + LETTER * 0.33)];
}
