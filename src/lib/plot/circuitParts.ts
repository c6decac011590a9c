import type { LetterSymbol } from '../core/characteristics/symbol';
import {
	arc,
	circle,
	polyline,
	symbolWords,
	words,
	type SketchMark,
	type SketchPoint
} from './sketch';

/** Marks of a circuit diagram; symbols after IEC 60617, from memory. Places are in pt. */

const LINE = { width: 0.8 };
const PLATE = { width: 1.2 };
export const LETTER = 8.2;

/** A part between two points on one line: what it looks like with its middle at the origin, along x. */
type Drawn = (length: number) => SketchMark[];

export const wire = (...points: readonly SketchPoint[]): SketchMark => polyline(points, LINE);

/** Where wires meet. */
export const joint = (at: SketchPoint): SketchMark => circle(at, 1.6, { fill: 'ink' });

/** A place to connect to. */
export const port = (at: SketchPoint): SketchMark => circle(at, 1.8, { width: 0.8, fill: 'paper' });

export const ground = ([x, y]: SketchPoint): SketchMark[] => [
	wire([x, y], [x, y + 6]),
	polyline(
		[
			[x - 6, y + 6],
			[x + 6, y + 6]
		],
		PLATE
	),
	polyline(
		[
			[x - 3.6, y + 8.6],
			[x + 3.6, y + 8.6]
		],
		LINE
	),
	polyline(
		[
			[x - 1.4, y + 11.2],
			[x + 1.4, y + 11.2]
		],
		LINE
	)
];

/** A two-terminal part from one point to another, with its leads; lies along x or along y. */
function between(from: SketchPoint, to: SketchPoint, size: number, draw: Drawn): SketchMark[] {
	const isAlongX = from[1] === to[1];
	const run = isAlongX ? to[0] - from[0] : to[1] - from[1];
	const [length, towards] = [Math.abs(run), Math.sign(run)];
	const middle: SketchPoint = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2];
	const place = ([along, across]: SketchPoint): SketchPoint =>
		isAlongX
			? [middle[0] + along * towards, middle[1] + across * towards]
			: [middle[0] - across * towards, middle[1] + along * towards];
	const lead = (a: number, b: number) => wire(place([a, 0]), place([b, 0]));
	return [
		lead(-length / 2, -size / 2),
		lead(size / 2, length / 2),
		...draw(size).map((mark) => turned(mark, place))
	];
}

function turned(mark: SketchMark, place: (point: SketchPoint) => SketchPoint): SketchMark {
	if (mark.kind === 'text') return { ...mark, at: place(mark.at) };
	return {
		...mark,
		steps: mark.steps.map((step) => {
			switch (step.to) {
				case 'move':
				case 'line':
					return { ...step, at: place(step.at) };
				case 'curve':
					return { ...step, by: place(step.by), then: place(step.then), at: place(step.at) };
				case 'close':
					return step;
				default:
					return step satisfies never;
			}
		})
	};
}

export const resistor = (from: SketchPoint, to: SketchPoint): SketchMark[] =>
	between(from, to, 20, (length) => [
		polyline(
			[
				[-length / 2, -3.6],
				[length / 2, -3.6],
				[length / 2, 3.6],
				[-length / 2, 3.6]
			],
			{ width: 0.8, fill: 'paper' },
			true
		)
	]);

export const capacitor = (from: SketchPoint, to: SketchPoint): SketchMark[] =>
	between(from, to, 4.4, (gap) => [
		polyline(
			[
				[-gap / 2, -8],
				[-gap / 2, 8]
			],
			PLATE
		),
		polyline(
			[
				[gap / 2, -8],
				[gap / 2, 8]
			],
			PLATE
		)
	]);

export const inductor = (from: SketchPoint, to: SketchPoint): SketchMark[] =>
	between(from, to, 24, () => [-9, -3, 3, 9].map((x) => arc([x, 0], 3, [2, 4], LINE)));

/** The device under test; its cathode points to `to`. */
export const diode = (from: SketchPoint, to: SketchPoint): SketchMark[] =>
	between(from, to, 14, (length) => [
		polyline(
			[
				[length / 2, 0],
				[-length / 2, -7],
				[-length / 2, 7]
			],
			{ width: 0.8, fill: 'paper' },
			true
		),
		polyline(
			[
				[length / 2, -7],
				[length / 2, 7]
			],
			PLATE
		)
	]);

const RADIUS = 11;

/** A source or a meter with a letter in it. */
export const round = (from: SketchPoint, to: SketchPoint, letter: LetterSymbol): SketchMark[] => {
	const middle: SketchPoint = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2];
	return [
		...between(from, to, 2 * RADIUS, () => [circle([0, 0], RADIUS, LINE)]),
		...symbolWords(letter, [middle[0], middle[1] + LETTER * 0.34], {
			size: LETTER,
			align: 'middle'
		})
	];
};

/** An instrument with its name in lines. */
export function instrument(
	[left, top]: SketchPoint,
	[width, height]: SketchPoint,
	lines: readonly string[]
): SketchMark[] {
	const first = top + height / 2 - ((lines.length - 1) * 9.6) / 2 + LETTER * 0.34;
	return [
		polyline(
			[
				[left, top],
				[left + width, top],
				[left + width, top + height],
				[left, top + height]
			],
			LINE,
			true
		),
		...lines.map((line, at) =>
			words(line, [left + width / 2, first + at * 9.6], { size: LETTER, align: 'middle' })
		)
	];
}

export const label = (
	text: string,
	at: SketchPoint,
	align: 'left' | 'middle' | 'right' = 'middle'
): SketchMark => words(text, at, { size: LETTER, align });

export const named = (
	symbol: LetterSymbol,
	at: SketchPoint,
	align: 'left' | 'middle' | 'right' = 'middle',
	rest = ''
): SketchMark[] => symbolWords(symbol, at, { size: LETTER, align, rest });
