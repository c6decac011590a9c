import type { DatasheetDocument } from '../../../../core/datasheet/document';

/** Ids of all rows of the capacitance tables: a chart has changed when one of them has. */
export const capacitanceRowIds = (document: DatasheetDocument): string[] =>
	document.sections.flatMap((section) =>
		section.kind === 'capacitance-table' ? section.rows.map(({ id }) => id) : []
	);
