import type { Box } from '../box';
import type { DrawnMark } from '../drawnMark';
import type { Block } from '../flow';
import { moveBoxes } from '../box';
import type { Structure } from '../structure';
import { STYLES } from '../styles';
import { changeBar } from '../table';
import { breakLines, paragraphBoxes, textSpan, type Span } from '../typeset';

const CAPTION = { first: 9, below: 4.3 };

/** A drawing with its caption above it. */
export interface Figure {
	readonly number: number;
	/** What follows its number; given the caption's node, so that links in it belong there. */
	readonly caption: (tag: number) => readonly Span[];
	readonly width: number;
	readonly drawing: {
		readonly width: number;
		readonly height: number;
		readonly marks: readonly DrawnMark[];
	} | null;
	/** What it shows, in words. */
	readonly alternative: string;
	readonly isChanged: boolean;
}

/** Caption and drawing under each other, from the block's upper left corner. */
export function figureBlock(figure: Figure, structure: Structure): Block {
	const captionTag = structure.add('Caption', structure.root);
	const caption = breakLines(
		[
			textSpan(`Fig.\u00a0${figure.number}`, STYLES.captionBold),
			textSpan('\u00a0\u00a0', STYLES.caption),
			...figure.caption(captionTag)
		],
		figure.width
	);
	const { leading } = STYLES.caption;
	const captionHeight = CAPTION.first + (caption.length - 1) * leading + CAPTION.below;
	const boxes: Box[] = [
		...paragraphBoxes(caption, { tag: captionTag, x: 0, y: CAPTION.first }, leading),
		...(figure.isChanged
			? [
					changeBar(
						structure.add('Span', captionTag, { actualText: 'changed' }),
						0,
						captionHeight - 1
					)
				]
			: [])
	];
	const { drawing } = figure;
	if (drawing)
		boxes.push({
			kind: 'drawing',
			tag: structure.add('Figure', structure.root, { alternative: figure.alternative }),
			x: 0,
			y: captionHeight,
			...drawing
		});
	return { height: captionHeight + (drawing?.height ?? 0), boxes };
}

/** Blocks under each other as one, with their distance from the upper left corner. */
export function stacked(blocks: readonly { readonly block: Block; readonly gap: number }[]): Block {
	let height = 0;
	const boxes = blocks.flatMap(({ block, gap }) => {
		const moved = moveBoxes(block.boxes, 0, height + gap);
		height += gap + block.height;
		return moved;
	});
	return { height, boxes };
}
