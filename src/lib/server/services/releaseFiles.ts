import { capacitanceTableCsv } from '$lib/core/datasheet/capacitanceTableCsv';
import { readDocument } from '$lib/core/datasheet/readDocument';
import type { PublicationRecord } from '$lib/core/datasheet/record';
import { renderDatasheet } from '../pdf/renderDatasheet';

/** The files of a release, by name. */
export const RELEASE_FILES = {
	'datasheet.pdf': 'application/pdf',
	'capacitance-table.csv': 'text/csv; charset=utf-8',
	'datasheet.json': 'application/json'
} as const;

export type ReleaseFileName = keyof typeof RELEASE_FILES;
export const RELEASE_FILE_NAMES: readonly ReleaseFileName[] = [
	'datasheet.pdf',
	'capacitance-table.csv',
	'datasheet.json'
];

export function isReleaseFileName(name: string): name is ReleaseFileName {
	return Object.hasOwn(RELEASE_FILES, name);
}

/**
 * The bytes of one file of a release: a function of the frozen document, the record and the
 * renderer. The JSON is the frozen bytes themselves, so its SHA-256 is the content hash.
 */
export async function makeReleaseFile(
	name: ReleaseFileName,
	bytes: Uint8Array,
	record: PublicationRecord
): Promise<Uint8Array> {
	switch (name) {
		case 'datasheet.pdf':
			return renderDatasheet(readDocument(bytes), record);
		case 'capacitance-table.csv':
			return new TextEncoder().encode(capacitanceTableCsv(readDocument(bytes)));
		case 'datasheet.json':
			return bytes;
		default:
			return name satisfies never;
	}
}
