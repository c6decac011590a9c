import type { Place } from './chartParts';

interface Box {
	readonly left: number;
	readonly right: number;
	readonly top: number;
	readonly bottom: number;
}

export interface LabelSpot {
	readonly curve: Place;
	readonly label: Place;
	readonly align: 'left' | 'right';
}

/** Where along a curve a label may hang, as shares of its points. */
const SHARES = [0.5, 0.4, 0.6, 0.3, 0.7, 0.2, 0.8];
/** Where the label's near end may lie from there, in sizes of its type: to the right, and downwards. */
const OFFSETS = [
	[2, -1.6],
	[-2, -1.6],
	[2, 2.4],
	[-2, 2.4],
	[1.2, -3.2],
	[-1.2, -3.2],
	[1.2, 4],
	[-1.2, 4]
] as const;
/** Farther from everything than this, in sizes, no place is better than another. */
const ENOUGH = 1.2;

/**
 * Places for the labels of curves: beside their own curve, away from the other curves and labels, in
 * the frame. The first of equally good places wins, so that the same curves give the same places.
 */
export function placeLabels(
	curves: readonly { readonly points: readonly Place[]; readonly width: number }[],
	frame: { readonly width: number; readonly height: number },
	size: number
): LabelSpot[] {
	const obstacles = curves.flatMap(({ points }) => filled(points, size / 2));
	const taken: Box[] = [];
	return curves.map(({ points, width }) => {
		let best: { spot: LabelSpot; box: Box; room: number } | undefined;
		for (const share of SHARES)
			for (const [right, down] of OFFSETS) {
				const curve = points[Math.round(share * (points.length - 1))] ?? { x: 0, y: 0 };
				const spot = spotAt(curve, right * size, down * size);
				const box = boxOf(spot, width, size);
				if (!isInside(box, frame)) continue;
				const room = Math.min(
					ENOUGH * size,
					...obstacles.map((point) => pointDistance(box, point)),
					...taken.map((other) => boxDistance(box, other))
				);
				if (best === undefined || room > best.room + 0.01) best = { spot, box, room };
			}
		const chosen = best ?? fallback(points, width, size);
		taken.push(chosen.box);
		return chosen.spot;
	});
}

function spotAt(curve: Place, right: number, down: number): LabelSpot {
	return {
		curve,
		label: { x: curve.x + right, y: curve.y + down },
		align: right > 0 ? 'left' : 'right'
	};
}

function boxOf({ label, align }: LabelSpot, width: number, size: number): Box {
	const left = align === 'left' ? label.x : label.x - width;
	return { left, right: left + width, top: label.y - size * 0.75, bottom: label.y + size * 0.25 };
}

function fallback(points: readonly Place[], width: number, size: number) {
	const middle = points[Math.floor(points.length / 2)] ?? { x: 0, y: 0 };
	const spot = spotAt(middle, size, -size);
	return { spot, box: boxOf(spot, width, size) };
}

const isInside = (box: Box, frame: { readonly width: number; readonly height: number }) =>
	box.left >= 2 && box.top >= 2 && box.right <= frame.width - 2 && box.bottom <= frame.height - 2;

/** A line of points no farther apart than a step. */
function filled(points: readonly Place[], step: number): Place[] {
	return points.flatMap((point, at) => {
		const next = points[at + 1];
		if (next === undefined) return [point];
		const parts = Math.max(1, Math.ceil(Math.hypot(next.x - point.x, next.y - point.y) / step));
		return Array.from({ length: parts }, (_, part) => ({
			x: point.x + ((next.x - point.x) * part) / parts,
			y: point.y + ((next.y - point.y) * part) / parts
		}));
	});
}

const pointDistance = (box: Box, { x, y }: Place) =>
	boxDistance(box, { left: x, right: x, top: y, bottom: y });

function boxDistance(a: Box, b: Box): number {
	const across = Math.max(a.left - b.right, b.left - a.right, 0);
	const down = Math.max(a.top - b.bottom, b.top - a.bottom, 0);
	return Math.hypot(across, down);
}
