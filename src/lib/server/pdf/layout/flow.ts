import type { Box } from './box';

/** Boxes that stay together; places are from the block's upper left corner, x = 0 at the measure. */
export interface Block {
	readonly height: number;
	readonly boxes: readonly Box[];
}

/** A table row, and the rule that separates it from the row above. */
export interface Row extends Block {
	readonly rule: {
		readonly from: number;
		readonly weight: number;
		readonly isGrey: boolean;
	} | null;
	readonly keepWithNext?: boolean;
}

export type Part =
	| { readonly kind: 'block'; readonly block: Block }
	| {
			readonly kind: 'table';
			/** Column heads, repeated on every page. */
			readonly head: Block;
			readonly rows: readonly Row[];
			readonly width: number;
			/** Short key below each page's part of the table. */
			readonly key: Block | null;
			/** What stands below the end of the table instead of the key: the terms in full. */
			readonly terms: Block | null;
	  };

/** The place that marks lead to: where their terms stand in full. */
export const TERMS = 'terms';

export interface Section {
	/** Name in the bookmarks; `null` for a part without a head. */
	readonly title: string | null;
	/** What links call it; nothing leads to a section without one. */
	readonly anchor?: string;
	/** In pt, or the usual space between sections, which is wider on the first page. */
	readonly gapBefore: number | 'section';
	readonly head: Block | null;
	/** The head on the following pages of a long table. */
	readonly continued: Block | null;
	readonly parts: readonly Part[];
}

export const stackHeight = (blocks: readonly Block[]) =>
	blocks.reduce((sum, block) => sum + block.height, 0);
