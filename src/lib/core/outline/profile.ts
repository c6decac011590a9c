import type { Sizes } from './packageOutline';
import { area, mirrored, openLine, type Point, type Shape } from './view';

/** How far the mould's sides lean in from its widest line, as a share of the body's height. */
const DRAFT = 0.07;

/** The moulded body from the side: widest at half height, between stand-off and height. */
export function mouldedBody(width: number, size: Sizes): Shape {
	const [top, bottom] = [-size('A'), -size('A_1')];
	const lean = (bottom - top) * DRAFT;
	const right: Point[] = [
		[width / 2 - lean, top],
		[width / 2, (top + bottom) / 2],
		[width / 2 - lean, bottom]
	];
	return area('body', [...right, ...mirrored(right).reverse()], 'body');
}

/** Half way up the body: where leads leave it. */
const exitHeight = (size: Sizes) => -(size('A') + size('A_1')) / 2;

/**
 * A lead that leaves the body at half height, goes down and ends in a foot on the board, at the
 * right-hand side.
 */
export function gullLead(bodyWidth: number, size: Sizes): Point[] {
	const [end, foot, c] = [size('H_E') / 2, size('L_p'), size('c')];
	const exit = bodyWidth / 2;
	const heel = end - foot;
	const knee = exit + (heel - exit) * 0.25;
	const middle = exitHeight(size);
	return [
		[exit, middle - c / 2],
		[knee + c, middle - c / 2],
		[heel + c / 2, -c],
		[end, -c],
		[end, 0],
		[heel - c / 2, 0],
		[knee, middle + c / 2],
		[exit, middle + c / 2]
	];
}

/** A lead that leaves the body at half height, goes down along its end and lies below it. */
export function bentLead(bodyWidth: number, size: Sizes): Point[] {
	const [end, foot, c] = [size('H_E') / 2, size('L_p'), size('c')];
	const middle = exitHeight(size);
	return [
		[bodyWidth / 2, middle - c / 2],
		[end, middle - c / 2],
		[end, 0],
		[end - foot, 0],
		[end - foot, -c],
		[end - c, -c],
		[end - c, middle + c / 2],
		[bodyWidth / 2, middle + c / 2]
	];
}

/** The board that a package sits on, a little wider than the package. */
export const seatingPlane = (width: number): Shape =>
	openLine(
		'seating plane',
		[
			[-width / 2 - SEAT_OVERHANG, 0],
			[width / 2 + SEAT_OVERHANG, 0]
		],
		'thin'
	);

const SEAT_OVERHANG = 0.25;

/** The line through the middle of a view. */
export const centreLine = (from: Point, to: Point): Shape =>
	openLine('centre line', [from, to], 'centre');
