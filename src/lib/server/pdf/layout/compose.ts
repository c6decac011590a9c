import { asArtifacts, moveBoxes, type Box, type RuleBox } from './box';
import { stackHeight, TERMS, type Block, type Part, type Row, type Section } from './flow';
import { mm } from './paper';
import { sliceBlock } from './sliceBlock';
import { RULES } from './styles';

export interface PageLimits {
	readonly left: number;
	readonly top: number;
	readonly bottom: number;
	/** Body of the first page: below the masthead, above what a proof reserves. */
	readonly firstTop: number;
	readonly firstBottom: number;
}

export interface ComposedPage {
	readonly boxes: Box[];
	/** Lowest used place. */
	end: number;
}

/** Where something begins: index of the page, and pt from its upper edge. */
export interface PagePlace {
	readonly page: number;
	readonly y: number;
}

export interface Composition {
	readonly pages: readonly ComposedPage[];
	readonly bookmarks: readonly ({ readonly title: string } & PagePlace)[];
	/** Places that links lead to, by name; of several the first. */
	readonly anchors: ReadonlyMap<string, PagePlace>;
}

type Table = Extract<Part, { kind: 'table' }>;

/**
 * Fills pages with sections in order. A head stays with its table's head and first two rows; a table
 * is broken only when no page could hold it whole, and repeats its heads then; what explains marks
 * stays on the page with the rows that carry them.
 */
export function compose(sections: readonly Section[], limits: PageLimits): Composition {
	const pages: ComposedPage[] = [{ boxes: [], end: limits.firstTop }];
	const bookmarks: ({ title: string } & PagePlace)[] = [];
	const anchors = new Map<string, PagePlace>();

	const pageHeight = limits.bottom - limits.top;
	const page = () => pages[pages.length - 1] ?? { boxes: [], end: 0 };
	const bottom = () => (pages.length === 1 ? limits.firstBottom : limits.bottom);
	const isFresh = () => pages.length > 1 && page().boxes.length === 0;
	const fits = (height: number) => page().end + height <= bottom() + 0.01;
	const turn = () => pages.push({ boxes: [], end: limits.top });
	const here = (): PagePlace => ({ page: pages.length - 1, y: page().end });
	const anchor = (name: string) => {
		if (!anchors.has(name)) anchors.set(name, here());
	};
	const place = (block: Block) => {
		page().boxes.push(...moveBoxes(block.boxes, limits.left, page().end));
		page().end += block.height;
	};

	/** A block stays whole where a page can hold it; one that none can goes on over pages. */
	const placeBlock = (block: Block) => {
		let rest = block;
		while (rest.height > pageHeight) {
			const room = bottom() - page().end;
			if (room < pageHeight * LEAST_SHARE && !isFresh()) {
				turn();
				continue;
			}
			const sliced = sliceBlock(rest, room);
			if (sliced.rest === null) break;
			place(sliced.first);
			turn();
			rest = sliced.rest;
		}
		if (!fits(rest.height) && !isFresh()) turn();
		place(rest);
	};

	const placeTable = (table: Table, section: Section) => {
		place(table.head);
		let isFirstOnPage = true;
		table.rows.forEach((row, at) => {
			if (!isFirstOnPage && !fits(heldTogether(table, at, pageHeight))) {
				closeTable(table, false);
				turn();
				for (const block of [section.continued, table.head])
					if (block) place({ ...block, boxes: asArtifacts(block.boxes) });
				isFirstOnPage = true;
			}
			if (!isFirstOnPage && row.rule)
				page().boxes.push(rowRule(row, table, limits.left, page().end));
			place(row);
			isFirstOnPage = false;
		});
		closeTable(table, true);
	};

	const closeTable = (table: Table, isEnd: boolean) => {
		page().boxes.push({
			kind: 'rule',
			tag: null,
			from: [limits.left, page().end],
			to: [limits.left + table.width, page().end],
			weight: RULES.table
		});
		const below = isEnd ? (table.terms ?? table.key) : table.key;
		if (isEnd && table.terms) anchor(TERMS);
		if (below) place(isEnd ? below : { ...below, boxes: asArtifacts(below.boxes) });
	};

	for (const section of sections) {
		const gap = isFresh() ? 0 : gapBefore(section, pages.length === 1);
		const whole = sectionHeight(section);
		const isBreakable = whole > pageHeight;
		if (!isFresh() && !fits(gap + (isBreakable ? startHeight(section, pageHeight) : whole))) turn();
		else page().end += gap;

		if (section.title !== null) bookmarks.push({ title: section.title, ...here() });
		if (section.anchor !== undefined) anchor(section.anchor);
		if (section.head) place(section.head);
		for (const part of section.parts) {
			if (part.kind === 'table') placeTable(part, section);
			else placeBlock(part.block);
		}
	}
	return { pages, bookmarks, anchors };
}

/** A block longer than a page begins on a page that has at least this share of it free. */
const LEAST_SHARE = 0.25;

/** Usual space between sections, on the first page and on the others. */
const SECTION_GAP = { first: mm(6.4), other: mm(5.2) };

function gapBefore(section: Section, isFirstPage: boolean): number {
	if (section.gapBefore !== 'section') return section.gapBefore;
	return isFirstPage ? SECTION_GAP.first : SECTION_GAP.other;
}

const belowHeight = (table: Table) => (table.terms ?? table.key)?.height ?? 0;

function partHeight(part: Part): number {
	return part.kind === 'block'
		? part.block.height
		: part.head.height + stackHeight(part.rows) + belowHeight(part);
}

const sectionHeight = (section: Section) =>
	(section.head?.height ?? 0) + section.parts.reduce((sum, part) => sum + partHeight(part), 0);

/** What must fit for a section to begin on a page: its head, and its table's head with two rows. */
function startHeight(section: Section, pageHeight: number): number {
	const [first] = section.parts;
	const head = section.head?.height ?? 0;
	if (!first) return head;
	if (first.kind === 'block')
		return head + (first.block.height > pageHeight ? pageHeight * LEAST_SHARE : first.block.height);
	return head + first.head.height + stackHeight(first.rows.slice(0, 3)) + (first.key?.height ?? 0);
}

/** Height a row needs: with the rows it is kept with, the last two together, and what stands below. */
function heldTogether(table: Table, from: number, pageHeight: number): number {
	let to = from;
	while (table.rows[to]?.keepWithNext && to < table.rows.length - 1) to++;
	if (to === table.rows.length - 2) to++;
	const isEnd = to === table.rows.length - 1;
	const below = isEnd ? belowHeight(table) : (table.key?.height ?? 0);
	const held = stackHeight(table.rows.slice(from, to + 1)) + below;
	return held > pageHeight * 0.6 ? (table.rows[from]?.height ?? 0) + below : held;
}

function rowRule(row: Row, table: Table, left: number, y: number): RuleBox {
	return {
		kind: 'rule',
		tag: null,
		from: [left + (row.rule?.from ?? 0), y],
		to: [left + table.width, y],
		weight: row.rule?.weight ?? 0,
		...(row.rule?.isGrey && { ink: 'grey' })
	};
}
