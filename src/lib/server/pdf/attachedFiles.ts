import { AFRelationship } from 'pdf-lib';
import { canonicalBytes } from '../../core/datasheet/canonicalBytes';
import { capacitanceTableCsv } from '../../core/datasheet/capacitanceTableCsv';
import type { DatasheetDocument } from '../../core/datasheet/document';
import { CAPACITANCE_TABLE } from './layout/sections/basisKey';
import { MODEL } from './layout/sections/model';

/** A file that travels inside the PDF. */
export interface EmbeddedFile {
	readonly name: string;
	/** What it holds, in words. */
	readonly holds: string;
	readonly mimeType: string;
	readonly bytes: Uint8Array;
	readonly relationship: AFRelationship;
	/** Name of the place on the sheet that prints the same, for a link to it. */
	readonly printedAt: string | null;
}

/** The document itself, its capacitance tables as a spreadsheet can read them, and its model. */
export function attachedFiles(document: DatasheetDocument): EmbeddedFile[] {
	const hasTable = document.sections.some(
		(section) => section.kind === 'capacitance-table' && section.rows.length > 0
	);
	return [
		{
			name: 'datasheet.json',
			holds: 'every value, with its basis',
			mimeType: 'application/json',
			bytes: canonicalBytes(document),
			relationship: AFRelationship.Source,
			printedAt: null
		},
		...(hasTable
			? [
					{
						name: 'capacitance-table.csv',
						holds: 'capacitance at each bias',
						mimeType: 'text/csv',
						bytes: new TextEncoder().encode(capacitanceTableCsv(document)),
						relationship: AFRelationship.Data,
						printedAt: CAPACITANCE_TABLE
					}
				]
			: []),
		...document.sections.flatMap((section) =>
			section.kind === 'model'
				? [
						{
							name: 'model.lib',
							holds: 'SPICE model of a typical device',
							mimeType: 'text/plain',
							bytes: new TextEncoder().encode(section.text),
							relationship: AFRelationship.Supplement,
							printedAt: MODEL
						}
					]
				: []
		)
	];
}
