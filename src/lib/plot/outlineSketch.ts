import { packageLand, packageViews } from '../core/outline/packageViews';
import type { PackageOutline } from '../core/outline/packageOutline';
import type { Filling, LineKind, View, ViewName } from '../core/outline/view';
import { dimensionMarks } from './dimensionMarks';
import {
	extentOf,
	moveMarks,
	polyline,
	sketchOf,
	words,
	type Look,
	type Shade,
	type Sketch,
	type SketchMark
} from './sketch';

/** One millimetre of paper in pt. */
const MILLIMETRE = 72 / 25.4;

const LINES: Readonly<Record<LineKind, Look>> = {
	body: { width: 0.9 },
	lead: { width: 0.6 },
	thin: { width: 0.25 },
	centre: { width: 0.2, dash: [7, 1.6, 1.2, 1.6] },
	courtyard: { width: 0.4, dash: [3, 2] }
};

const FILLINGS: Readonly<Record<Filling, Shade | null>> = {
	none: null,
	paper: 'paper',
	pad: 'tint',
	mark: 'ink'
};

const NUMBER = 7.6;
/** Space between views. */
const BETWEEN = 16;

/** How many times a drawing may be as large as the package, the first that fits. */
const SCALES = [20, 10, 8, 6, 5, 4, 3, 2] as const;

export interface ScaledSketch extends Sketch {
	/** 10 for 10 : 1. */
	readonly scale: number;
}

interface Room {
	readonly width: number;
	readonly height: number;
}

type Drawn = Pick<PackageOutline, 'shape' | 'dimensions' | 'land'>;

/** A package from above, from the side and from its end, as large as the room lets it be. */
export function outlineSketch(drawn: Drawn, room: Room): ScaledSketch {
	const views = new Map(packageViews(drawn).map((view) => [view.name, view]));
	return largest(SCALES, room, (scale) => arranged(views, scale));
}

/**
 * The pattern to solder to; `null` for a package without one.
 *
 * @param largestScale that of the outline beside it, which it doesn't exceed
 */
export function landSketch(
	drawn: Drawn,
	room: Room,
	largestScale: number = SCALES[0]
): ScaledSketch | null {
	const view = packageLand(drawn);
	const scales = SCALES.filter((scale) => scale <= largestScale);
	return view === null ? null : largest(scales, room, (scale) => viewMarks(view, scale));
}

function largest(
	scales: readonly number[],
	room: Room,
	draw: (scale: number) => SketchMark[]
): ScaledSketch {
	for (const scale of scales) {
		const sketch = sketchOf(draw(scale));
		if (sketch.width <= room.width && sketch.height <= room.height) return { ...sketch, scale };
	}
	return { ...sketchOf(draw(1)), scale: 1 };
}

/** Side view below the top view on one middle, end view beside the side view on one board. */
function arranged(views: ReadonlyMap<ViewName, View>, scale: number): SketchMark[] {
	const marks = (name: ViewName) => {
		const view = views.get(name);
		return view === undefined ? [] : viewMarks(view, scale);
	};
	const [top, side, end] = [marks('top'), marks('side'), marks('end')];
	const down = extentOf(top).bottom + BETWEEN - extentOf(side).top;
	const across = extentOf(side).right + BETWEEN - extentOf(end).left;
	return [...top, ...moveMarks(side, [0, down]), ...moveMarks(end, [across, down])];
}

function viewMarks(view: View, scale: number): SketchMark[] {
	const points = scale * MILLIMETRE;
	return [
		...view.shapes.map(({ points: corners, isClosed, line, fill }) => {
			const shade = FILLINGS[fill];
			return polyline(
				corners.map(([x, y]) => [x * points, y * points] as const),
				{ ...(line === null ? {} : LINES[line]), ...(shade === null ? {} : { fill: shade }) },
				isClosed
			);
		}),
		...view.dimensions.flatMap((dimension) => dimensionMarks(dimension, view.bounds, points)),
		...view.labels.map(({ text, at }) =>
			words(text, [at[0] * points, at[1] * points - 2.4], { size: NUMBER, align: 'middle' })
		)
	];
}
