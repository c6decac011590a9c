import type { LetterSymbol } from '../characteristics/symbol';
import type { Sizes } from './packageOutline';
import { bentLead, centreLine, gullLead, mouldedBody, seatingPlane } from './profile';
import { area, mirrored, rectangle, viewOf, type Point, type Shape, type View } from './view';

const sign = (quantity: string, subscript?: string): LetterSymbol =>
	subscript === undefined ? { quantity } : { quantity, subscript };

/** Where the cathode's band lies on the body, in shares of its length from that end. */
const BAND = { from: 0.09, width: 0.12 };
const OVERHANG = 0.3;

/** A moulded body with a lead at each end: gull wings, or leads bent below it. */
export function twoLeadViews(size: Sizes, lead: 'gull' | 'bent'): View[] {
	return [topView(size), sideView(size, lead), endView(size)];
}

function topView(size: Sizes): View {
	const [D, E, H, b] = [size('D'), size('E'), size('H_E'), size('b')];
	const length = (H - D) / 2;
	const leadAt = (name: string, side: -1 | 1) =>
		rectangle(
			name,
			{ middle: [(side * (D + length)) / 2, 0], width: length, height: b },
			{ line: 'lead', fill: 'paper' }
		);
	return viewOf(
		'top',
		[
			leadAt('lead 1', -1),
			leadAt('lead 2', 1),
			rectangle('body', { middle: [0, 0], width: D, height: E }, { line: 'body', fill: 'paper' }),
			band(D, E),
			centreLine([-H / 2 - OVERHANG, 0], [H / 2 + OVERHANG, 0]),
			centreLine([0, -E / 2 - OVERHANG], [0, E / 2 + OVERHANG])
		],
		{
			labels: terminalNumbers(D / 2 + length / 2, b / 2),
			dimensions: [
				{
					symbol: sign('D'),
					side: 'above',
					level: 1,
					from: -D / 2,
					to: D / 2,
					reach: [-E / 2, -E / 2]
				},
				{
					symbol: sign('H', 'E'),
					side: 'above',
					level: 2,
					from: -H / 2,
					to: H / 2,
					reach: [-b / 2, -b / 2]
				},
				{
					symbol: sign('E'),
					side: 'right',
					level: 1,
					from: -E / 2,
					to: E / 2,
					reach: [D / 2, D / 2]
				},
				{
					symbol: sign('b'),
					side: 'left',
					level: 1,
					from: -b / 2,
					to: b / 2,
					reach: [-H / 2, -H / 2]
				}
			]
		}
	);
}

const band = (D: number, E: number): Shape =>
	rectangle(
		'cathode mark',
		{
			middle: [-D / 2 + D * (BAND.from + BAND.width / 2), 0],
			width: D * BAND.width,
			height: E
		},
		{ line: null, fill: 'mark' }
	);

/** 1 at the marked end, 2 at the other, above the terminals. */
const terminalNumbers = (x: number, halfWidth: number) => [
	{ text: '1', at: [-x, -halfWidth] as const },
	{ text: '2', at: [x, -halfWidth] as const }
];

function sideView(size: Sizes, kind: 'gull' | 'bent'): View {
	const [D, H, A, foot] = [size('D'), size('H_E'), size('A'), size('L_p')];
	const lead = kind === 'gull' ? gullLead(D, size) : bentLead(D, size);
	const standOff = size('A_1');
	return viewOf(
		'side',
		[
			seatingPlane(H),
			mouldedBody(D, size),
			area('lead 1', mirrored(lead), 'lead'),
			area('lead 2', lead, 'lead')
		],
		{
			dimensions: [
				{
					symbol: sign('A'),
					side: 'left',
					level: 1,
					from: -A,
					to: 0,
					reach: [-D / 2, -H / 2]
				},
				{
					symbol: sign('A', '1'),
					side: 'right',
					level: 1,
					from: -standOff,
					to: 0,
					reach: [D / 2, H / 2]
				},
				{
					symbol: sign('L', 'p'),
					side: 'below',
					level: 1,
					from: H / 2 - foot,
					to: H / 2,
					reach: [0, 0]
				}
			]
		}
	);
}

function endView(size: Sizes): View {
	const [E, b, c] = [size('E'), size('b'), size('c')];
	const exit = -(size('A') + size('A_1')) / 2;
	const lead: Point[] = [
		[-b / 2, exit - c / 2],
		[b / 2, exit - c / 2],
		[b / 2, 0],
		[-b / 2, 0]
	];
	return viewOf(
		'end',
		[
			seatingPlane(E),
			mouldedBody(E, size),
			area('lead', lead, 'lead'),
			centreLine([0, -size('A') - OVERHANG], [0, OVERHANG])
		],
		{
			dimensions: [
				{ symbol: sign('c'), side: 'right', level: 1, from: -c, to: 0, reach: [b / 2, b / 2] }
			]
		}
	);
}

/** A block with a metal terminal around each end. */
export function chipViews(size: Sizes): View[] {
	const [D, E, A, end] = [size('D'), size('E'), size('A'), size('L')];
	const terminal = (name: string, side: -1 | 1, y: number, height: number) =>
		rectangle(
			name,
			{ middle: [side * (D / 2 - end / 2), y], width: end, height },
			{ line: 'lead', fill: 'pad' }
		);
	const body = (y: number, width: number, height: number) =>
		rectangle('body', { middle: [0, y], width, height }, { line: 'body', fill: 'paper' });
	const top = viewOf(
		'top',
		[
			body(0, D, E),
			terminal('terminal 1', -1, 0, E),
			terminal('terminal 2', 1, 0, E),
			rectangle(
				'cathode mark',
				{ middle: [-D / 2 + end + D * 0.06, 0], width: D * 0.06, height: E },
				{ line: null, fill: 'mark' }
			),
			centreLine([-D / 2 - OVERHANG / 2, 0], [D / 2 + OVERHANG / 2, 0])
		],
		{
			labels: terminalNumbers(D / 2 - end / 2, E / 2),
			dimensions: [
				{
					symbol: sign('D'),
					side: 'above',
					level: 2,
					from: -D / 2,
					to: D / 2,
					reach: [-E / 2, -E / 2]
				},
				{
					symbol: sign('E'),
					side: 'right',
					level: 1,
					from: -E / 2,
					to: E / 2,
					reach: [D / 2, D / 2]
				}
			]
		}
	);
	const side = viewOf(
		'side',
		[
			seatingPlane(D),
			body(-A / 2, D, A),
			terminal('terminal 1', -1, -A / 2, A),
			terminal('terminal 2', 1, -A / 2, A)
		],
		{
			dimensions: [
				{ symbol: sign('A'), side: 'left', level: 1, from: -A, to: 0, reach: [-D / 2, -D / 2] },
				{
					symbol: sign('L'),
					side: 'below',
					level: 1,
					from: D / 2 - end,
					to: D / 2,
					reach: [0, 0]
				}
			]
		}
	);
	const endOn = viewOf(
		'end',
		[
			seatingPlane(E),
			rectangle(
				'terminal',
				{ middle: [0, -A / 2], width: E, height: A },
				{ line: 'body', fill: 'pad' }
			),
			centreLine([0, -A - OVERHANG / 2], [0, OVERHANG / 2])
		],
		{ dimensions: [] }
	);
	return [top, side, endOn];
}
