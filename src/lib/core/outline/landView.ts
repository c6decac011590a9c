import type { OutlineShape, Sizes } from './packageOutline';
import { centreLine } from './profile';
import { rectangle, viewOf, type Point, type Shape, type View } from './view';

/** Room around pads and body that other parts keep off, in mm. */
const COURTYARD = 0.25;

const pad = (name: string, middle: Point, width: number, height: number): Shape =>
	rectangle(name, { middle, width, height }, { line: 'lead', fill: 'pad' });

/** The pads to solder to, with the body over them and the room around. */
export function landView(shape: OutlineShape, size: Sizes, land: Sizes): View {
	return shape === 'gull-three' ? threePads(size, land) : twoPads(size, land);
}

function around(width: number, height: number): Shape {
	return rectangle(
		'courtyard',
		{ middle: [0, 0], width: width + 2 * COURTYARD, height: height + 2 * COURTYARD },
		{ line: 'courtyard', fill: 'none' }
	);
}

function twoPads(size: Sizes, land: Sizes): View {
	const [D, E] = [size('D'), size('E')];
	const [Z, G, X, Y] = [land('Z'), land('G'), land('X'), land('Y')];
	const middle = (G + Y) / 2;
	return viewOf(
		'land',
		[
			around(Math.max(Z, D), Math.max(X, E)),
			pad('pad 1', [-middle, 0], Y, X),
			pad('pad 2', [middle, 0], Y, X),
			rectangle('body', { middle: [0, 0], width: D, height: E }, { line: 'thin', fill: 'none' }),
			centreLine([-Z / 2 - 0.4, 0], [Z / 2 + 0.4, 0])
		],
		{
			dimensions: [
				{
					symbol: { quantity: 'G' },
					side: 'below',
					level: 1,
					from: -G / 2,
					to: G / 2,
					reach: [X / 2, X / 2]
				},
				{
					symbol: { quantity: 'Y' },
					side: 'below',
					level: 1,
					from: G / 2,
					to: Z / 2,
					reach: [X / 2, X / 2]
				},
				{
					symbol: { quantity: 'Z' },
					side: 'below',
					level: 2,
					from: -Z / 2,
					to: Z / 2,
					reach: [X / 2, X / 2]
				},
				{
					symbol: { quantity: 'X' },
					side: 'right',
					level: 1,
					from: -X / 2,
					to: X / 2,
					reach: [Z / 2, Z / 2]
				}
			]
		}
	);
}

function threePads(size: Sizes, land: Sizes): View {
	const [D, E, pitch] = [size('D'), size('E'), size('e_1')];
	const [C, X, Y] = [land('C'), land('X'), land('Y')];
	return viewOf(
		'land',
		[
			around(Math.max(D, pitch + X), C + Y),
			pad('pad 1', [-pitch / 2, C / 2], X, Y),
			pad('pad 2', [pitch / 2, C / 2], X, Y),
			pad('pad 3', [0, -C / 2], X, Y),
			rectangle('body', { middle: [0, 0], width: D, height: E }, { line: 'thin', fill: 'none' }),
			centreLine([0, -C / 2 - Y / 2 - 0.4], [0, C / 2 + Y / 2 + 0.4])
		],
		{
			dimensions: [
				{
					symbol: { quantity: 'e', subscript: '1' },
					side: 'below',
					level: 2,
					from: -pitch / 2,
					to: pitch / 2,
					reach: [C / 2, C / 2]
				},
				{
					symbol: { quantity: 'X' },
					side: 'below',
					level: 1,
					from: pitch / 2 - X / 2,
					to: pitch / 2 + X / 2,
					reach: [C / 2 + Y / 2, C / 2 + Y / 2]
				},
				{
					symbol: { quantity: 'C' },
					side: 'right',
					level: 1,
					from: -C / 2,
					to: C / 2,
					reach: [X / 2, pitch / 2 + X / 2]
				},
				{
					symbol: { quantity: 'Y' },
					side: 'left',
					level: 1,
					from: C / 2 - Y / 2,
					to: C / 2 + Y / 2,
					reach: [-pitch / 2 - X / 2, -pitch / 2 - X / 2]
				}
			]
		}
	);
}
