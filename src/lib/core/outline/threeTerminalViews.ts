import type { LetterSymbol } from '../characteristics/symbol';
import type { Sizes } from './packageOutline';
import { centreLine, gullLead, mouldedBody, seatingPlane } from './profile';
import { area, mirrored, rectangle, viewOf, type View } from './view';

const sign = (quantity: string, subscript?: string): LetterSymbol =>
	subscript === undefined ? { quantity } : { quantity, subscript };

const OVERHANG = 0.3;

/** A moulded body with two gull wings on one side and one on the other. */
export function threeLeadViews(size: Sizes): View[] {
	return [topView(size), sideView(size), endView(size)];
}

/** Leads 1 and 2 below, 3 above; the body lies along x. */
function topView(size: Sizes): View {
	const [D, E, H, b, pitch] = [size('D'), size('E'), size('H_E'), size('b'), size('e_1')];
	const length = (H - E) / 2;
	const lead = (name: string, x: number, side: -1 | 1) =>
		rectangle(
			name,
			{ middle: [x, (side * (E + length)) / 2], width: b, height: length },
			{ line: 'lead', fill: 'paper' }
		);
	const numbersAt = E / 2 + length;
	return viewOf(
		'top',
		[
			lead('lead 1', -pitch / 2, 1),
			lead('lead 2', pitch / 2, 1),
			lead('lead 3', 0, -1),
			rectangle('body', { middle: [0, 0], width: D, height: E }, { line: 'body', fill: 'paper' }),
			centreLine([0, -H / 2 - OVERHANG], [0, H / 2 + OVERHANG])
		],
		{
			labels: [
				{ text: '1', at: [-pitch / 2 - b, numbersAt] },
				{ text: '2', at: [pitch / 2 + b, numbersAt] },
				{ text: '3', at: [b, -numbersAt + length] }
			],
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
					symbol: sign('e', '1'),
					side: 'below',
					level: 1,
					from: -pitch / 2,
					to: pitch / 2,
					reach: [H / 2, H / 2]
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
					symbol: sign('H', 'E'),
					side: 'right',
					level: 2,
					from: -H / 2,
					to: H / 2,
					reach: [b / 2, pitch / 2 + b / 2]
				}
			]
		}
	);
}

/** Along the body: the wings of both sides. */
function sideView(size: Sizes): View {
	const [E, H, A, foot] = [size('E'), size('H_E'), size('A'), size('L_p')];
	const lead = gullLead(E, size);
	return viewOf(
		'side',
		[
			seatingPlane(H),
			mouldedBody(E, size),
			area('lead 3', mirrored(lead), 'lead'),
			area('lead 1', lead, 'lead')
		],
		{
			dimensions: [
				{ symbol: sign('A'), side: 'left', level: 1, from: -A, to: 0, reach: [-E / 2, -H / 2] },
				{
					symbol: sign('A', '1'),
					side: 'right',
					level: 1,
					from: -size('A_1'),
					to: 0,
					reach: [E / 2, H / 2]
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

/** The side of leads 1 and 2. */
function endView(size: Sizes): View {
	const [D, b, c, pitch] = [size('D'), size('b'), size('c'), size('e_1')];
	const exit = -(size('A') + size('A_1')) / 2;
	const lead = (name: string, x: number) =>
		area(
			name,
			[
				[x - b / 2, exit - c / 2],
				[x + b / 2, exit - c / 2],
				[x + b / 2, 0],
				[x - b / 2, 0]
			],
			'lead'
		);
	return viewOf(
		'end',
		[
			seatingPlane(D),
			mouldedBody(D, size),
			lead('lead 1', -pitch / 2),
			lead('lead 2', pitch / 2),
			centreLine([0, -size('A') - OVERHANG], [0, OVERHANG])
		],
		{
			dimensions: [
				{
					symbol: sign('b'),
					side: 'below',
					level: 1,
					from: -pitch / 2 - b / 2,
					to: -pitch / 2 + b / 2,
					reach: [0, 0]
				},
				{
					symbol: sign('c'),
					side: 'right',
					level: 1,
					from: -c,
					to: 0,
					reach: [pitch / 2 + b / 2, pitch / 2 + b / 2]
				}
			]
		}
	);
}
