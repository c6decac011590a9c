import { moveBoxes, type Box } from '../box';
import type { Block } from '../flow';
import { GUTTER, mm, THIRD } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { STYLES } from '../styles';
import { changeBar } from '../table';
import {
	breakLines,
	lineBoxes,
	linkSpan,
	oneLine,
	paragraphBoxes,
	richSpans,
	textSpan
} from '../typeset';
import { sectionHead } from './sectionHead';
import { terminalsColumn } from './terminals';

const PARAGRAPH_WIDTH = mm(114);
const ASIDE_X = mm(120);
const FIRST = 10.2;
const BETWEEN_PARAGRAPHS = 5;
/** Hang of a list's dash, and space between its items. */
const HANG = mm(3.2);
const BETWEEN_ITEMS = 1.4;

/** Files that travel inside the PDF, and what they hold. */
export interface AttachedFile {
	readonly name: string;
	readonly holds: string;
	/** Name of the place on the sheet that prints the same. */
	readonly printedAt: string | null;
}

/** A paragraph across two thirds of the measure; the attached files are named beside the first one. */
export function proseParagraphs(
	section: SectionOf<'prose'>,
	sheet: Sheet,
	attached: readonly AttachedFile[]
): Block {
	const { structure } = sheet;
	const boxes: Box[] = [];
	const head = section.heading === null ? null : sectionHead(section.heading, '', { structure });
	const top = head === null ? 0 : head.height + 3;
	let y = top + FIRST;
	section.paragraphs.forEach((paragraph, at) => {
		const style = STYLES.headline;
		const lines = breakLines(richSpans(paragraph, style, sheet.isProof), PARAGRAPH_WIDTH);
		if (lines.length === 0) return;
		if (at > 0) y += style.leading + BETWEEN_PARAGRAPHS;
		boxes.push(
			...paragraphBoxes(lines, { tag: structure.add('P', structure.root), x: 0, y }, style.leading)
		);
		const from = y;
		y += (lines.length - 1) * style.leading;
		if (sheet.changed.has(`${section.block}.${at + 1}`))
			boxes.push(changeBar(null, from - style.size, y + 3));
	});
	const end = y + 3;
	const aside = asideBoxes(attached, sheet, top + FIRST - 1);
	return {
		height: Math.max(end, aside.end),
		boxes: [...(head?.boxes ?? []), ...boxes, ...aside.boxes]
	};
}

function asideBoxes(attached: readonly AttachedFile[], sheet: Sheet, first: number) {
	if (attached.length === 0) return { boxes: [], end: 0 };
	const { structure } = sheet;
	const { leading } = STYLES.aside;
	const head = {
		tag: structure.add('P', structure.root),
		spans: [textSpan('Attached to this file', STYLES.asideHead)]
	};
	const files = attached.map(({ name, holds, printedAt }) => {
		const tag = structure.add('P', structure.root);
		const named =
			printedAt === null
				? textSpan(name, STYLES.aside)
				: linkSpan(name, STYLES.aside, { to: printedAt, tag: structure.add('Link', tag) });
		return { tag, spans: [named, textSpan(`: ${holds}`, STYLES.aside)] };
	});
	let y = first;
	const boxes = [head, ...files].flatMap(({ tag, spans }) => {
		const lines = breakLines(spans, THIRD);
		const placed = paragraphBoxes(lines, { tag, x: ASIDE_X, y }, leading);
		y += lines.length * leading;
		return placed;
	});
	return { boxes, end: y - leading + 3 };
}

/** Sections that take a third of the measure. */
export type ColumnSection = SectionOf<'prose'> | SectionOf<'terminals'>;

/** Up to three lists side by side, each with its own rule and head; the terminals are as wide. */
export function listColumns(sections: readonly ColumnSection[], sheet: Sheet): Block {
	const columns = sections.map((section, at) => {
		const x = at * (THIRD + GUTTER);
		return section.kind === 'terminals'
			? terminalsColumn(section, x, sheet)
			: listColumn(section, x, sheet);
	});
	return {
		height: Math.max(...columns.map(({ height }) => height)),
		boxes: columns.flatMap(({ boxes }) => boxes)
	};
}

function listColumn(section: SectionOf<'prose'>, x: number, sheet: Sheet): Block {
	const { structure } = sheet;
	const style = STYLES.list;
	const head = sectionHead(section.heading ?? '', '', { structure, x, width: THIRD });
	const list = structure.add('L', structure.root);
	const boxes: Box[] = [...head.boxes];
	let y = head.height + 9;
	section.paragraphs.forEach((paragraph, place) => {
		const item = structure.add('LI', list);
		const lines = breakLines(richSpans(paragraph, style, sheet.isProof), THIRD - HANG);
		boxes.push(
			...lineBoxes(oneLine([textSpan('\u2013', style)]), {
				tag: structure.add('Lbl', item),
				x,
				y
			}),
			...paragraphBoxes(lines, { tag: structure.add('LBody', item), x: x + HANG, y }, style.leading)
		);
		const next = y + lines.length * style.leading + BETWEEN_ITEMS;
		if (sheet.changed.has(`${section.block}.${place + 1}`))
			boxes.push(...moveBoxes([changeBar(null, y - style.size, next - style.size)], x, 0));
		y = next;
	});
	const height = y - style.leading - BETWEEN_ITEMS + 3;
	return { height, boxes };
}
