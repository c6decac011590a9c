import { symbolRuns } from '../../../../core/datasheet/symbolRuns';
import type { RichText } from '../../../../core/datasheet/document';
import type { Box } from '../box';
import type { Block } from '../flow';
import { MEASURE } from '../paper';
import type { Structure } from '../structure';
import { RULES, STYLES } from '../styles';
import { breakLines, lineBoxes, oneLine, paragraphBoxes, richSpans, textSpan } from '../typeset';

/** Baseline of the head below its rule, and where what follows begins. */
const HEAD = { baseline: 15, height: 19 };

export interface HeadPlace {
	/** The tag tree; a repeated head stays out of it. */
	readonly structure: Structure | null;
	readonly x?: number;
	readonly width?: number;
}

/** A section's rule and head, with its general condition at the right. */
export function sectionHead(heading: string, note: RichText | string, place: HeadPlace): Block {
	const x = place.x ?? 0;
	const width = place.width ?? MEASURE;
	const right = richSpans(typeof note === 'string' ? symbolRuns(note) : note, STYLES.sectionNote);
	const noteLine = oneLine(right);
	const headLines = breakLines([textSpan(heading, STYLES.sectionHead)], width);
	const headWidth = Math.max(...headLines.map((line) => line.width), 0);
	const hasRoom = headLines.length === 1 && headWidth + noteLine.width + 12 <= width;
	const noteLines = hasRoom ? [noteLine] : breakLines(right, width);
	const below = HEAD.baseline + (headLines.length - 1) * STYLES.sectionHead.leading;
	const isEmpty = noteLine.width === 0;
	const tagOf = (role: 'H2' | 'P') => place.structure?.add(role, place.structure.root) ?? null;
	const tag = tagOf('H2');
	const noteTag = isEmpty ? null : tagOf('P');

	const noteBoxes: Box[] = isEmpty
		? []
		: noteLines.flatMap((line, at) =>
				lineBoxes(line, {
					tag: noteTag,
					x: x + width,
					y: hasRoom ? HEAD.baseline : below + (at + 1) * STYLES.sectionNote.leading,
					align: 'right'
				})
			);
	return {
		height:
			HEAD.height +
			below -
			HEAD.baseline +
			(hasRoom || isEmpty ? 0 : noteLines.length * STYLES.sectionNote.leading),
		boxes: [
			{ kind: 'rule', tag: null, from: [x, 0], to: [x + width, 0], weight: RULES.section },
			...paragraphBoxes(headLines, { tag, x, y: HEAD.baseline }, STYLES.sectionHead.leading),
			...noteBoxes
		]
	};
}

/** The head of a table's next page. */
export const continuedHead = (heading: string): Block =>
	sectionHead(heading, 'continued', { structure: null });
