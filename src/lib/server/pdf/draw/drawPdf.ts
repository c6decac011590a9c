import { PDFDocument, PDFName, PDFStreamWriter, type PDFRef } from 'pdf-lib';
import type { DatasheetDocument } from '../../../core/datasheet/document';
import type { PublicationRecord } from '../../../core/datasheet/record';
import type { LaidOut } from '../layout/layoutDatasheet';
import type { EmbeddedFile } from '../attachedFiles';
import { FontBook } from './FontBook';
import { PageWriter } from './PageWriter';
import { writeMetadata } from './writeMetadata';
import { writeOutline } from './writeOutline';
import { writeTags, type TaggedPage } from './writeTags';

/** Many in one: compressing each stream anew costs more than its length. */
const OBJECTS_IN_A_STREAM = 1000;

/** Boxes → operators → one PDF file: pages, fonts, tag tree, bookmarks, metadata, attached files. */
export async function drawPdf(
	laidOut: LaidOut,
	source: { readonly document: DatasheetDocument; readonly record: PublicationRecord },
	files: readonly EmbeddedFile[]
): Promise<Uint8Array> {
	const pdf = await PDFDocument.create({ updateMetadata: false });
	const { context, catalog } = pdf;
	const fonts = new FontBook(context);
	const { width, height } = laidOut.paper;

	const pages = laidOut.pages.map(({ boxes }, at): TaggedPage => {
		const writer = new PageWriter(height, fonts);
		writer.write(boxes, (node) => laidOut.structure[node]?.role ?? 'Span');
		const page = pdf.addPage([width, height]);
		page.node.set(PDFName.of('Contents'), context.register(context.flateStream(writer.content)));
		page.node.set(PDFName.of('StructParents'), context.obj(at));
		page.node.set(PDFName.of('Tabs'), PDFName.of('S'));
		return { ref: page.ref, marked: writer.marked };
	});
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
	const at = new Date(source.record.at);
	for (const file of files)
		await pdf.attach(file.bytes, file.name, {
			mimeType: file.mimeType,
			description: file.holds,
			creationDate: at,
			modificationDate: at,
			afRelationship: file.relationship
		});

	await pdf.flush();
	return PDFStreamWriter.forContext(
		context,
		Infinity,
		true,
		OBJECTS_IN_A_STREAM
	).serializeToBuffer();
}
