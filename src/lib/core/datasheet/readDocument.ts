import { datasheetDocument, type DatasheetDocument } from './document';

/** The document behind stored canonical bytes. The bytes stay the truth; this is only a reading. */
export function readDocument(bytes: Uint8Array): DatasheetDocument {
	return datasheetDocument.parse(JSON.parse(new TextDecoder().decode(bytes)));
}
