import type { Box } from '../box';
import type { Section } from '../flow';
import { GUTTER, THIRD } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { STYLES } from '../styles';
import { breakLines, paragraphBoxes, textSpan, type Line } from '../typeset';
import { sectionHead } from './sectionHead';

const FIRST = 8.6;
const BETWEEN = 4;

interface Paragraph {
	readonly head: readonly Line[];
	readonly text: readonly Line[];
	readonly height: number;
}

/** The first line of a paragraph is its head when more lines follow it. */
function paragraphOf(text: string): Paragraph {
	const [first = '', ...rest] = text.split('\n');
	const [head, body] = rest.length === 0 ? ['', first] : [first, rest.join(' ')];
	const lines = {
		head: head === '' ? [] : breakLines([textSpan(head, STYLES.noticeHead)], THIRD),
		text: breakLines([textSpan(body, STYLES.notice)], THIRD)
	};
	return {
		...lines,
		height:
			lines.head.length * STYLES.noticeHead.leading +
			lines.text.length * STYLES.notice.leading +
			BETWEEN
	};
}

/** Paragraphs in order over three columns, so that the highest column is as low as can be. */
function threeColumns(paragraphs: readonly Paragraph[]): Paragraph[][] {
	let best: Paragraph[][] = [[...paragraphs]];
	let lowest = Infinity;
	for (let first = 0; first <= paragraphs.length; first++)
		for (let second = first; second <= paragraphs.length; second++) {
			const columns = [
				paragraphs.slice(0, first),
				paragraphs.slice(first, second),
				paragraphs.slice(second)
			];
			const height = Math.max(
				...columns.map((column) => column.reduce((sum, each) => sum + each.height, 0))
			);
			if (height < lowest - 0.01) [best, lowest] = [columns, height];
		}
	return best.filter((column) => column.length > 0);
}

/** The organization's legal notice, in three columns; `null` when it has none. */
export function notice(section: SectionOf<'notice'>, sheet: Sheet): Section | null {
	if (section.paragraphs.length === 0) return null;
	const { structure } = sheet;
	const head = sectionHead(section.heading, '', { structure });
	const columns = threeColumns(section.paragraphs.map(paragraphOf));
	const boxes: Box[] = [];
	let height = 0;
	columns.forEach((column, at) => {
		const x = at * (THIRD + GUTTER);
		let y = FIRST;
		for (const { head: headLines, text } of column) {
			if (headLines.length > 0) {
				const tag = structure.add('H3', structure.root);
				boxes.push(...paragraphBoxes(headLines, { tag, x, y }, STYLES.noticeHead.leading));
				y += headLines.length * STYLES.noticeHead.leading;
			}
			const tag = structure.add('P', structure.root);
			boxes.push(...paragraphBoxes(text, { tag, x, y }, STYLES.notice.leading));
			y += text.length * STYLES.notice.leading + BETWEEN;
		}
		height = Math.max(height, y - BETWEEN - STYLES.notice.leading + 3);
	});
	return {
		title: section.heading,
		gapBefore: 'section',
		head,
		continued: null,
		parts: [{ kind: 'block', block: { height, boxes } }]
	};
}
