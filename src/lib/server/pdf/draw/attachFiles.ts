import { PDFHexString, PDFName, PDFString, type PDFContext, type PDFDict } from 'pdf-lib';
import type { EmbeddedFile } from '../attachedFiles';

/**
 * Puts files into the PDF as ISO 19005-3, 6.8 asks: each with its media type, dates and its
 * relationship to the document, listed in the catalogue's `AF` and by name, names in order.
 */
export function attachFiles(
	context: PDFContext,
	catalog: PDFDict,
	files: readonly EmbeddedFile[],
	at: Date
): void {
	const date = PDFString.fromDate(at);
	const sorted = [...files].sort((a, b) => (a.name < b.name ? -1 : 1));
	const specifications = sorted.map(({ name, holds, mimeType, bytes, relationship }) => {
		const file = context.register(
			context.flateStream(bytes, {
				Type: 'EmbeddedFile',
				Subtype: mimeType,
				Params: { Size: bytes.length, CreationDate: date, ModDate: date }
			})
		);
		return context.register(
			context.obj({
				Type: 'Filespec',
				F: PDFString.of(name),
				UF: PDFHexString.fromText(name),
				Desc: PDFHexString.fromText(holds),
				EF: { F: file, UF: file },
				AFRelationship: relationship
			})
		);
	});
	if (specifications.length === 0) return;
	const names = sorted.flatMap(({ name }, index) => [
		PDFHexString.fromText(name),
		...specifications.slice(index, index + 1)
	]);
	catalog.set(PDFName.of('Names'), context.obj({ EmbeddedFiles: { Names: names } }));
	catalog.set(PDFName.of('AF'), context.obj(specifications));
}
