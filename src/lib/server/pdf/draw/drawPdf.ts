import {
	PDFDocument,
	PDFName,
	PDFStreamWriter,
	type PDFContext,
	type PDFPage,
	type PDFRef
} from 'pdf-lib';
import type { Box } from '../layout/box';
import type { DatasheetDocument } from '../../../core/datasheet/document';
import type { PublicationRecord } from '../../../core/datasheet/record';
import type { LaidOut } from '../layout/layoutDatasheet';
import type { EmbeddedFile } from '../attachedFiles';
import { attachFiles } from './attachFiles';
import { FontBook } from './FontBook';
import { PageWriter, type MarkedContent } from './PageWriter';
import { writeLinks } from './writeLinks';
import { writeMetadata } from './writeMetadata';
import { writeOutline } from './writeOutline';
import { writeOutputIntent } from './writeOutputIntent';
import { writeTags, type TaggedPage } from './writeTags';

/** Many in one: compressing each stream anew costs more than its length. */
const OBJECTS_IN_A_STREAM = 1000;

/**
 * Boxes → operators → one PDF file: pages, links, fonts, tag tree, bookmarks, metadata, output
 * intent, attached files. Built to PDF/A-3b (ISO 19005-3); no validator of it was at hand.
 */
export async function drawPdf(
	laidOut: LaidOut,
	source: { readonly document: DatasheetDocument; readonly record: PublicationRecord },
	files: readonly EmbeddedFile[]
): Promise<Uint8Array> {
	const pdf = await PDFDocument.create({ updateMetadata: false });
	const { context, catalog } = pdf;
	const fonts = new FontBook(context);
	const { width, height } = laidOut.paper;

	const drawn = laidOut.pages.map(({ boxes }, at): DrawnPage => {
		const writer = new PageWriter(height, fonts);
		writer.write(boxes, (node) => laidOut.structure[node]?.role ?? 'Span');
		const page = pdf.addPage([width, height]);
		page.node.set(PDFName.of('Contents'), context.register(context.flateStream(writer.content)));
		page.node.set(PDFName.of('StructParents'), context.obj(at));
		page.node.set(PDFName.of('Tabs'), PDFName.of('S'));
		return { page, boxes, marked: writer.marked };
	});
	const pages = linked(context, laidOut, drawn);
	fonts.embed();
	const resources = context.register(context.obj({ Font: fonts.resources() }));
	pdf.getPages().forEach((page) => page.node.set(PDFName.of('Resources'), resources));

	catalog.set(PDFName.of('StructTreeRoot'), writeTags(context, laidOut.structure, pages));
	const outline = writeOutline(
		context,
		laidOut,
		pages.map(({ ref }): PDFRef => ref)
	);
	if (outline) catalog.set(PDFName.of('Outlines'), outline);
	writeMetadata(pdf, source.document, source.record);
	writeOutputIntent(context, catalog);
	attachFiles(context, catalog, files, new Date(source.record.at));

	await pdf.flush();
	return PDFStreamWriter.forContext(
		context,
		Infinity,
		true,
		OBJECTS_IN_A_STREAM
	).serializeToBuffer();
}

interface DrawnPage {
	readonly page: PDFPage;
	readonly boxes: readonly Box[];
	readonly marked: readonly MarkedContent[];
}

/** The pages with their links, numbered on after the pages themselves. */
function linked(context: PDFContext, laidOut: LaidOut, drawn: readonly DrawnPage[]): TaggedPage[] {
	const pages = drawn.map(({ page }): PDFRef => page.ref);
	let firstNumber = drawn.length;
	return drawn.map(({ page, boxes, marked }) => {
		const links = writeLinks(context, page, boxes, { laidOut, pages, firstNumber });
		firstNumber += links.length;
		return { ref: page.ref, marked, links };
	});
}
