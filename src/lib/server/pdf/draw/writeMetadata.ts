import { PDFHexString, PDFName, type PDFDocument } from 'pdf-lib';
import type { DatasheetDocument } from '../../../core/datasheet/document';
import type { PublicationRecord } from '../../../core/datasheet/record';
import { statusWords } from '../layout/statusWords';
import { rendererVersion } from '../rendererVersion';

const escapeXml = (text: string) =>
	text
		.replaceAll('&', '&amp;')
		.replaceAll('<', '&lt;')
		.replaceAll('>', '&gt;')
		.replaceAll('"', '&quot;');

/** Document information, XMP, language and file identifier: all from the document and its record. */
export function writeMetadata(
	pdf: PDFDocument,
	document: DatasheetDocument,
	record: PublicationRecord
): void {
	const words = statusWords(document.status, record);
	const title = `${document.partNumber}, ${document.className}: datasheet`;
	const subject = `${document.description} ${words.word}, version ${words.version}, content hash ${record.contentHash}`;
	const at = new Date(record.at);
	const producer = `Platen, ${rendererVersion}`;

	pdf.setTitle(title);
	pdf.setAuthor(document.organization.name);
	pdf.setSubject(subject);
	pdf.setCreator('Platen');
	pdf.setProducer(producer);
	pdf.setCreationDate(at);
	pdf.setModificationDate(at);

	const { context, catalog } = pdf;
	catalog.set(PDFName.of('Lang'), PDFHexString.fromText(document.organization.language));
	catalog.set(PDFName.of('MarkInfo'), context.obj({ Marked: true }));
	catalog.set(PDFName.of('ViewerPreferences'), context.obj({ DisplayDocTitle: true }));
	const xmp = new TextEncoder().encode(
		xmpPacket({
			title,
			subject,
			producer,
			author: document.organization.name,
			language: document.organization.language,
			at: `${at.toISOString().slice(0, 19)}Z`
		})
	);
	catalog.set(
		PDFName.of('Metadata'),
		context.register(context.stream(xmp, { Type: 'Metadata', Subtype: 'XML' }))
	);
	const identifier = PDFHexString.of(record.contentHash.slice(0, 32).toUpperCase());
	context.trailerInfo.ID = context.obj([identifier, identifier]);
}

interface XmpFacts {
	readonly title: string;
	readonly subject: string;
	readonly producer: string;
	readonly author: string;
	readonly language: string;
	readonly at: string;
}

/** The same facts as XMP (ISO 16684-1), and what the file is built to (ISO 19005-3, 6.6.4). */
function xmpPacket(facts: XmpFacts): string {
	const alternative = (text: string) =>
		`<rdf:Alt><rdf:li xml:lang="x-default">${escapeXml(text)}</rdf:li></rdf:Alt>`;
	return `<?xpacket begin="\ufeff" id="W5M0MpCehiHzreSzNTczkc9d"?>
<x:xmpmeta xmlns:x="adobe:ns:meta/">
<rdf:RDF xmlns:rdf="http://www.w3.org/1999/02/22-rdf-syntax-ns#">
<rdf:Description rdf:about="" xmlns:dc="http://purl.org/dc/elements/1.1/" xmlns:xmp="http://ns.adobe.com/xap/1.0/" xmlns:pdf="http://ns.adobe.com/pdf/1.3/" xmlns:pdfaid="http://www.aiim.org/pdfa/ns/id/">
<pdfaid:part>3</pdfaid:part>
<pdfaid:conformance>B</pdfaid:conformance>
<dc:format>application/pdf</dc:format>
<dc:title>${alternative(facts.title)}</dc:title>
<dc:description>${alternative(facts.subject)}</dc:description>
<dc:creator><rdf:Seq><rdf:li>${escapeXml(facts.author)}</rdf:li></rdf:Seq></dc:creator>
<dc:language><rdf:Bag><rdf:li>${escapeXml(facts.language)}</rdf:li></rdf:Bag></dc:language>
<xmp:CreatorTool>Platen</xmp:CreatorTool>
<xmp:CreateDate>${facts.at}</xmp:CreateDate>
<xmp:ModifyDate>${facts.at}</xmp:ModifyDate>
<pdf:Producer>${escapeXml(facts.producer)}</pdf:Producer>
</rdf:Description>
</rdf:RDF>
</x:xmpmeta>
<?xpacket end="r"?>`;
}
