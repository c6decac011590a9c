import { AFRelationship } from 'pdf-lib';
import { canonicalBytes } from '../../core/datasheet/canonicalBytes';
import type { DatasheetDocument, PrintedNumber } from '../../core/datasheet/document';
import { BASIS_MARKS } from '../../core/limits/basis';

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
	const table = capacitanceCsv(document);
	return [
		{
			name: 'datasheet.json',
			holds: 'every value, with its basis',
			mimeType: 'application/json',
			bytes: canonicalBytes(document),
			relationship: AFRelationship.Source
		},
		...(table === null
			? []
			: [
					{
						name: 'capacitance-table.csv',
						holds: 'capacitance at each bias',
						mimeType: 'text/csv',
						bytes: new TextEncoder().encode(table),
						relationship: AFRelationship.Data
					}
				])
	];
}

/** One line a bias, digits as printed, units in the names; `null` without a capacitance table. */
export function capacitanceCsv(document: DatasheetDocument): string | null {
	const tables = document.sections.filter((section) => section.kind === 'capacitance-table');
	if (tables.length === 0) return null;
	const number = (printed: PrintedNumber | null) =>
		printed === null ? '' : printed.text.replace('\u2212', '-');
	return tables
		.map(({ unit, temperatureCelsius, frequency, rows }) =>
			[
				`temperature_degC,frequency_Hz,V_R_V,C_tot_min_${unit},C_tot_typ_${unit},C_tot_max_${unit},basis`,
				...rows.map((row) =>
					[
						temperatureCelsius,
						frequency,
						number(row.bias),
						number(row.minimum),
						number(row.typical),
						number(row.maximum),
						row.basis === null ? '' : BASIS_MARKS[row.basis]
					].join(',')
				)
			].join('\r\n')
		)
		.join('\r\n\r\n')
		.concat('\r\n');
}
