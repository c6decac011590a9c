import { moveBoxes, type Box } from './box';
import type { Block } from './flow';

/** How far below its baseline a line of text reaches, as a share of its size. */
const DESCENT = 0.3;

const sizeOf = (box: Extract<Box, { kind: 'text' }>) =>
	Math.max(...box.pieces.map(({ size }) => size));

function topOf(box: Box): number {
	switch (box.kind) {
		case 'text':
			return box.y - sizeOf(box);
		case 'rule':
			return Math.min(box.from[1], box.to[1]);
		case 'disc':
			return box.y - box.radius;
		case 'rectangle':
		case 'drawing':
			return box.y;
		default:
			return box satisfies never;
	}
}

function bottomOf(box: Box): number {
	switch (box.kind) {
		case 'text':
			return box.y + sizeOf(box) * DESCENT;
		case 'rule':
			return Math.max(box.from[1], box.to[1]);
		case 'disc':
			return box.y + box.radius;
		case 'rectangle':
		case 'drawing':
			return box.y + box.height;
		default:
			return box satisfies never;
	}
}

/**
 * A block that no page can hold in two parts: what fits into the room, and the rest from its own
 * top. Lines of text stay whole; columns go on side by side.
 *
 * @returns the rest as `null` when everything fits, or when nothing does and cutting is no use
 */
export function sliceBlock(
	block: Block,
	room: number
): { readonly first: Block; readonly rest: Block | null } {
	const fits = (box: Box) => bottomOf(box) <= room;
	const first = block.boxes.filter(fits);
	const below = block.boxes.filter((box) => !fits(box));
	if (first.length === 0 || below.length === 0) return { first: block, rest: null };
	const from = Math.min(...below.map(topOf));
	return {
		first: { height: room, boxes: first },
		rest: { height: block.height - from, boxes: moveBoxes(below, 0, -from) }
	};
}
