import type { TerminalGraphic } from '../core/template/template';
import { circle, polyline, sketchOf, words, type Sketch, type SketchMark } from './sketch';

const LINE = { width: 0.8 };
const THIN = { width: 0.5 };
const NUMBER = 7.6;

/** Half the height of the triangle, and where the graphic symbol lies between its terminals. */
const HALF = 9;
const SYMBOL = { from: 0, cathode: 28, anode: 48, to: 74 };

/**
 * The graphic symbol of a two-terminal device, cathode at the left, and its body from above with the
 * band and the code on it. Symbols after IEC 60617, from memory.
 */
export function terminalSketch(of: {
	readonly graphic: TerminalGraphic;
	/** Numbers of the terminals: the first is the cathode's. */
	readonly numbers: readonly [string, string];
	readonly hasBand: boolean;
	readonly marking: string | null;
}): Sketch {
	const [first, second] = of.numbers;
	return sketchOf([
		...symbolMarks(of.graphic),
		words(first, [SYMBOL.from, -8], { size: NUMBER, align: 'middle' }),
		words(second, [SYMBOL.to, -8], { size: NUMBER, align: 'middle' }),
		...bodyMarks(of)
	]);
}

function symbolMarks(graphic: TerminalGraphic): SketchMark[] {
	const { from, cathode, anode, to } = SYMBOL;
	const plates = graphic === 'tuning' ? 4 : 0;
	return [
		circle([from, 0], 1.8, LINE),
		circle([to, 0], 1.8, LINE),
		polyline(
			[
				[from + 1.8, 0],
				[cathode - plates, 0]
			],
			LINE
		),
		polyline(
			[
				[anode, 0],
				[to - 1.8, 0]
			],
			LINE
		),
		polyline(
			[
				[cathode, 0],
				[anode, -HALF],
				[anode, HALF]
			],
			LINE,
			true
		),
		...cathodeMarks(graphic)
	];
}

/** The bar at the cathode: plain, with hooks, or with a second plate. */
function cathodeMarks(graphic: TerminalGraphic): SketchMark[] {
	const x = SYMBOL.cathode;
	const bar = (at: number) =>
		polyline(
			[
				[at, -HALF],
				[at, HALF]
			],
			LINE
		);
	switch (graphic) {
		case 'diode':
			return [bar(x)];
		case 'tuning':
			return [bar(x), bar(x - 4)];
		case 'schottky':
			return [
				polyline(
					[
						[x + 4, -HALF + 3],
						[x + 4, -HALF],
						[x, -HALF],
						[x, HALF],
						[x - 4, HALF],
						[x - 4, HALF - 3]
					],
					LINE
				)
			];
		default:
			return graphic satisfies never;
	}
}

const BODY = { left: 88, width: 42, height: 26, lead: 8 };

function bodyMarks(of: {
	readonly numbers: readonly [string, string];
	readonly hasBand: boolean;
	readonly marking: string | null;
}): SketchMark[] {
	const { left, width, height, lead } = BODY;
	const box = (x: number, y: number, w: number, h: number, look: Parameters<typeof polyline>[1]) =>
		polyline(
			[
				[x, y],
				[x + w, y],
				[x + w, y + h],
				[x, y + h]
			],
			look,
			true
		);
	const body = left + lead;
	return [
		box(left, -4, lead, 8, THIN),
		box(body + width, -4, lead, 8, THIN),
		box(body, -height / 2, width, height, { width: 0.9 }),
		...(of.hasBand ? [box(body + 4, -height / 2, 4.5, height, { fill: 'ink' })] : []),
		...(of.marking === null
			? []
			: [
					words(of.marking, [body + width / 2 + (of.hasBand ? 3 : 0), 3.2], {
						size: 10,
						style: 'bold',
						align: 'middle'
					})
				]),
		words(of.numbers[0], [left + lead / 2, -6.5], { size: NUMBER, align: 'middle' }),
		words(of.numbers[1], [body + width + lead / 2, -6.5], { size: NUMBER, align: 'middle' })
	];
}
