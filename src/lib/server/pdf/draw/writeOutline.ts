import { PDFHexString, type PDFContext, type PDFRef } from 'pdf-lib';
import type { LaidOut } from '../layout/layoutDatasheet';
import { destination } from './writeLinks';

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
		const target = destination(context, page, bookmark, paper.height);
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
