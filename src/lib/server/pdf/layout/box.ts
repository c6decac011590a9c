import type { Face } from '../fonts/faces';
import type { DrawnMark } from './drawnMark';

/** Inks of the sheet: black first, verdigris for the lower plate only. */
export type Ink = 'black' | 'grey' | 'verdigris' | 'white';

/** What a box belongs to in the tag tree; `null` is an artifact: rules, running heads, marks. */
export type Tag = number | null;

/** Letters of one face and size, set in one go. */
export interface TextPiece {
	readonly face: Face;
	readonly size: number;
	readonly text: string;
	readonly width: number;
	/** Above the baseline; negative lowers. */
	readonly rise?: number;
	/** Space added after the piece. */
	readonly after?: number;
	readonly tracking?: number;
	readonly kerning?: false;
}

/** Pieces on one baseline. Places are in pt from the upper left corner, y downwards. */
export interface TextBox {
	readonly kind: 'text';
	readonly tag: Tag;
	readonly x: number;
	readonly y: number;
	readonly pieces: readonly TextPiece[];
	/** What copying gives, where it is not simply the letters: `V_R`. */
	readonly actual?: string;
	/** Name of the place in this document that it leads to. */
	readonly link?: string;
	readonly ink?: Ink;
	/** Set downwards, letters' tops to the right: the draft's margin. */
	readonly turned?: true;
}

export interface RuleBox {
	readonly kind: 'rule';
	readonly tag: Tag;
	readonly from: readonly [number, number];
	readonly to: readonly [number, number];
	readonly weight: number;
	readonly ink?: Ink;
	readonly dash?: readonly number[];
}

export interface RectangleBox {
	readonly kind: 'rectangle';
	readonly tag: Tag;
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
	readonly fill?: Ink;
	readonly stroke?: Ink;
	readonly weight?: number;
	readonly dash?: readonly number[];
}

/** The disc before a status word: full, half, ring or dashed ring. */
export interface DiscBox {
	readonly kind: 'disc';
	readonly tag: Tag;
	readonly x: number;
	readonly y: number;
	readonly radius: number;
	readonly look: 'full' | 'half' | 'ring' | 'dashed ring';
}

/** A chart: marks as the chart library drew them, from the box's upper left corner. */
export interface DrawingBox {
	readonly kind: 'drawing';
	readonly tag: Tag;
	readonly x: number;
	readonly y: number;
	readonly width: number;
	readonly height: number;
	readonly marks: readonly DrawnMark[];
}

export type Box = TextBox | RuleBox | RectangleBox | DiscBox | DrawingBox;

/** The same boxes elsewhere on the page. */
export function moveBoxes(boxes: readonly Box[], dx: number, dy: number): Box[] {
	return boxes.map((box) =>
		box.kind === 'rule'
			? {
					...box,
					from: [box.from[0] + dx, box.from[1] + dy],
					to: [box.to[0] + dx, box.to[1] + dy]
				}
			: { ...box, x: box.x + dx, y: box.y + dy }
	);
}

/** The same boxes out of the reading order: a table's head repeated on its next page. */
export const asArtifacts = (boxes: readonly Box[]): Box[] =>
	boxes.map((box) => ({ ...box, tag: null }));
