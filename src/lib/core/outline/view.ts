import type { LetterSymbol } from '../characteristics/symbol';

/** A point in mm of the package: x to the right, y downwards, the origin at the view's middle or seat. */
export type Point = readonly [number, number];

/** What a line means; the drawing gives each its weight. */
export type LineKind = 'body' | 'lead' | 'thin' | 'centre' | 'courtyard';
export type Filling = 'none' | 'paper' | 'pad' | 'mark';

/** A named stroke or area of a view. */
export interface Shape {
	/** What it is: `body`, `lead 1`, `cathode mark`. */
	readonly name: string;
	readonly points: readonly Point[];
	readonly isClosed: boolean;
	readonly line: LineKind | null;
	readonly fill: Filling;
}

/**
 * A dimension line with its arrowheads and letter. It runs outside the view, on the given side, one
 * level further out for each number; extension lines reach it from `reach`.
 */
export interface DimensionLine {
	readonly symbol: LetterSymbol;
	/** `above` and `below` measure along x, `left` and `right` along y. */
	readonly side: 'above' | 'below' | 'left' | 'right';
	readonly level: number;
	readonly from: number;
	readonly to: number;
	/** Where the extension lines begin: y of the measured edges, or x for a vertical dimension. */
	readonly reach: readonly [number, number];
}

/** A number beside a terminal. */
export interface TerminalLabel {
	readonly text: string;
	readonly at: Point;
}

export type ViewName = 'top' | 'side' | 'end' | 'land';

export interface View {
	readonly name: ViewName;
	readonly shapes: readonly Shape[];
	readonly dimensions: readonly DimensionLine[];
	readonly labels: readonly TerminalLabel[];
	readonly bounds: Bounds;
}

export interface Bounds {
	readonly left: number;
	readonly top: number;
	readonly right: number;
	readonly bottom: number;
}

/** The rectangle that all shapes of a view need. */
export function boundsOf(shapes: readonly Pick<Shape, 'points'>[]): Bounds {
	const points = shapes.flatMap((shape) => shape.points);
	const [xs, ys] = [points.map(([x]) => x), points.map(([, y]) => y)];
	return {
		left: Math.min(...xs),
		top: Math.min(...ys),
		right: Math.max(...xs),
		bottom: Math.max(...ys)
	};
}

/** A view of shapes: its bounds follow from them. */
export const viewOf = (
	name: ViewName,
	shapes: readonly Shape[],
	rest: Pick<View, 'dimensions'> & { readonly labels?: readonly TerminalLabel[] }
): View => ({
	name,
	shapes,
	dimensions: rest.dimensions,
	labels: rest.labels ?? [],
	bounds: boundsOf(shapes)
});

/** A rectangle about a middle. */
export function rectangle(
	name: string,
	place: { readonly middle: Point; readonly width: number; readonly height: number },
	look: Pick<Shape, 'line' | 'fill'>
): Shape {
	const { middle, width, height } = place;
	const [x, y] = middle;
	return {
		name,
		points: [
			[x - width / 2, y - height / 2],
			[x + width / 2, y - height / 2],
			[x + width / 2, y + height / 2],
			[x - width / 2, y + height / 2]
		],
		isClosed: true,
		...look
	};
}

export const openLine = (name: string, points: readonly Point[], line: LineKind): Shape => ({
	name,
	points,
	isClosed: false,
	line,
	fill: 'none'
});

export const area = (name: string, points: readonly Point[], line: LineKind): Shape => ({
	name,
	points,
	isClosed: true,
	line,
	fill: 'paper'
});

/** The same points on the other side of x = 0. */
export const mirrored = (points: readonly Point[]): Point[] => points.map(([x, y]) => [-x, y]);
