import {
	PDFHexString,
	PDFName,
	PDFNull,
	type PDFContext,
	type PDFPage,
	type PDFRef
} from 'pdf-lib';
import type { Box, TextBox } from '../layout/box';
import type { LaidOut } from '../layout/layoutDatasheet';
import { decimal } from './decimal';

/** A link on a page, with the node of the tag tree that it belongs to. */
export interface PageLink {
	readonly node: number;
	readonly ref: PDFRef;
}

/** The reader's eye lands this far above the line it was sent to. */
const ABOVE = 6;

/** A place of the document as PDF names it: page, and height from below; the zoom stays. */
export const destination = (
	context: PDFContext,
	page: PDFRef,
	{ y }: { readonly y: number },
	paperHeight: number
) => context.obj([page, PDFName.of('XYZ'), PDFNull, Math.round(paperHeight - y + ABOVE), PDFNull]);

/**
 * Writes the links of one page as annotations (ISO 32000-1, 12.5.6.5): printed as the page is, with
 * no border. Links in the tag tree come with a number by which the tree finds them.
 *
 * @param firstNumber number of the page's first link in the tag tree's way back
 */
export function writeLinks(
	context: PDFContext,
	page: PDFPage,
	boxes: readonly Box[],
	place: {
		readonly laidOut: LaidOut;
		readonly pages: readonly PDFRef[];
		readonly firstNumber: number;
	}
): PageLink[] {
	const { anchors, paper } = place.laidOut;
	const links = boxes.filter(isLink).flatMap((box) => {
		const target = anchors.get(box.link);
		const to = target && place.pages[target.page];
		return target && to ? [{ box, target, to }] : [];
	});
	const written = links.map(({ box, target, to }, at): PageLink => {
		const ref = context.register(
			context.obj({
				Type: 'Annot',
				Subtype: 'Link',
				Rect: linkRectangle(box, paper.height),
				Border: [0, 0, 0],
				// Printed; none of hidden, invisible, without view or toggled.
				F: 4,
				Contents: PDFHexString.fromText(`to page ${target.page + 1}`),
				Dest: destination(context, to, target, paper.height),
				StructParent: place.firstNumber + at
			})
		);
		return { node: box.tag, ref };
	});
	if (written.length > 0)
		page.node.set(PDFName.of('Annots'), context.obj(written.map(({ ref }) => ref)));
	return written;
}

type LinkBox = TextBox & { readonly link: string; readonly tag: number };

const isLink = (box: Box): box is LinkBox =>
	box.kind === 'text' && box.link !== undefined && box.tag !== null;

/** From a little below the baseline to above the capitals, as far as the letters go. */
function linkRectangle({ x, y, pieces }: LinkBox, paperHeight: number): number[] {
	const size = Math.max(...pieces.map((piece) => piece.size));
	const width = pieces.reduce((sum, piece) => sum + piece.width + (piece.after ?? 0), 0);
	const bottom = paperHeight - y - size * 0.3;
	return [x - 1, bottom, x + width + 1, bottom + size * 1.2].map((edge) => Number(decimal(edge)));
}
