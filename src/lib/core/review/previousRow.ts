import type { Change } from '../datasheet/change';
import type { DatasheetDocument, PrintedNumber } from '../datasheet/document';
import { compareRows } from '../datasheet/compareRows';
import { documentRows, documentTexts, type DocumentRow } from '../datasheet/documentRows';
import { plainText } from '../datasheet/plainText';
import type { SheetRow } from './sheetRows';
import type { PreviousRow, RowChange } from './verificationEvidence';

/** The release before, as far as a row can be set against it. */
export interface PreviousRelease {
	readonly version: string;
	readonly document: DatasheetDocument;
}

export interface AgainstPrevious {
	readonly previous: PreviousRow | null;
	/** Everything that differs in this row; a row that is new has no changes. */
	readonly changes: readonly Change[];
	/** Whether the release before said exactly the same. */
	readonly isUnchanged: boolean;
}

/** Sets one row of the sheet against the release before. */
export function againstPrevious(
	row: SheetRow,
	release: PreviousRelease | undefined
): AgainstPrevious {
	const nothing = { previous: null, changes: [], isUnchanged: false };
	if (release === undefined) return nothing;
	if (row.entry === null) return { ...nothing, isUnchanged: isSameText(row, release.document) };

	const was = documentRows(release.document).find((entry) => entry.row.id === row.row);
	if (was === undefined || was.kind !== row.entry.kind) return nothing;
	const changes = compareRows(was, row.entry);
	return {
		previous: {
			version: release.version,
			values: {
				minimum: valueBefore('minimum', was, changes),
				typical: valueBefore('typical', was, changes),
				maximum: valueBefore('maximum', was, changes)
			},
			changes: {
				minimum: changeOf('minimum', was, row.entry, changes),
				typical: changeOf('typical', was, row.entry, changes),
				maximum: changeOf('maximum', was, row.entry, changes)
			}
		},
		changes,
		isUnchanged: changes.length === 0
	};
}

function isSameText(row: SheetRow, before: DatasheetDocument): boolean {
	const was = documentTexts(before).find(({ id }) => id === row.row);
	return was !== undefined && plainText(was.runs) === row.statement.note;
}

type Part = 'minimum' | 'typical' | 'maximum';

function numberOf(part: Part, entry: DocumentRow): PrintedNumber | null {
	if (part === 'typical') return entry.kind === 'rating' ? null : entry.row.typical;
	return entry.row[part];
}

function valueBefore(part: Part, was: DocumentRow, changes: readonly Change[]) {
	const before = numberOf(part, was);
	if (before === null) return null;
	const relative = changes.find((change) => change.part === part)?.relative ?? null;
	return { text: before.text, changePercent: relative === null ? null : relative * 100 };
}

function changeOf(
	part: Part,
	was: DocumentRow,
	is: DocumentRow,
	changes: readonly Change[]
): RowChange | null {
	if (numberOf(part, was) === null && numberOf(part, is) === null) return null;
	const kind = changes.find((change) => change.part === part)?.kind;
	switch (kind) {
		case undefined:
			return 'same';
		case 'tightened':
		case 'loosened':
		case 'added':
		case 'removed':
			return kind;
		case 'moved':
		case 'rating':
		case 'text':
			return 'moved';
		default:
			return kind satisfies never;
	}
}
