import { AFRelationship } from 'pdf-lib';
import { canonicalBytes } from '../../core/datasheet/canonicalBytes';
import { capacitanceTableCsv } from '../../core/datasheet/capacitanceTableCsv';
import type { DatasheetDocument } from '../../core/datasheet/document';

/** A file that travels inside the PDF. */
export interface EmbeddedFile {
	readonly name: string;
	/** What it holds, in words. */
	readonly holds: string;
	readonly mimeType: string;
	readonly bytes: Uint8Array;
	readonly relationship: AFRelationship;
}

/** The document itself, and its capacitance tables as a spreadsheet can read them. */
export function attachedFiles(document: DatasheetDocument): EmbeddedFile[] {
	const hasTable = document.sections.some(({ kind }) => kind === 'capacitance-table');
	return [
		{
			name: 'datasheet.json',
			holds: 'every value, with its basis',
			mimeType: 'application/json',
			bytes: canonicalBytes(document),
			relationship: AFRelationship.Source
		},
		...(hasTable
			? [
					{
						name: 'capacitance-table.csv',
						holds: 'capacitance at each bias',
						mimeType: 'text/csv',
						bytes: new TextEncoder().encode(capacitanceTableCsv(document)),
						relationship: AFRelationship.Data
					}
				]
			: [])
	];
}
