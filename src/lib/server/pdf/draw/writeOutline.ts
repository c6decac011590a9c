import { PDFHexString, PDFName, PDFNull, type PDFContext, type PDFRef } from 'pdf-lib';
import type { LaidOut } from '../layout/layoutDatasheet';

/** Writes the bookmarks, one a section, and returns their root; `null` when there are none. */
export function writeOutline(
	context: PDFContext,
	{ bookmarks, paper }: Pick<LaidOut, 'bookmarks' | 'paper'>,
	pages: readonly PDFRef[]
): PDFRef | null {
	if (bookmarks.length === 0) return null;
	const root = context.nextRef();
	const items = bookmarks.map(() => context.nextRef());
	bookmarks.forEach((bookmark, at) => {
		const [ref, previous, next] = [items[at], items[at - 1], items[at + 1]];
		const page = pages[bookmark.page];
		if (!ref || !page) return;
		const target = context.obj([
			page,
			PDFName.of('XYZ'),
			PDFNull,
			Math.round(paper.height - bookmark.y + 6),
			PDFNull
		]);
		context.assign(
			ref,
			context.obj({
				Title: PDFHexString.fromText(bookmark.title),
				Parent: root,
				Dest: target,
				...(previous && { Prev: previous }),
				...(next && { Next: next })
			})
		);
	});
	const [first, last] = [items[0], items.at(-1)];
	context.assign(
		root,
		context.obj({
			Type: 'Outlines',
			Count: items.length,
			...(first && { First: first }),
			...(last && { Last: last })
		})
	);
	return root;
}
