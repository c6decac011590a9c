import { CHANGE_KINDS, type Change } from './change';
import { compareRows } from './compareRows';
import { compareTerms } from './compareTerms';
import { compareTexts } from './compareTexts';
import type { DatasheetDocument } from './document';
import { documentRows, type DocumentRow } from './documentRows';

/**
 * What a reader of the old datasheet has to know of the new one, weightiest first.
 *
 *   rows by id → numbers, conditions, basis
 *   terms of each basis → weaker, stronger, reworded
 *   texts and ordering codes → by place and by code
 */
export function compareDocuments(before: DatasheetDocument, after: DatasheetDocument): Change[] {
	const changes = [
		...compareAllRows(documentRows(before), documentRows(after)),
		...compareTerms(before.basisNotes, after.basisNotes),
		...compareTexts(before, after)
	];
	return changes.toSorted((a, b) => CHANGE_KINDS.indexOf(a.kind) - CHANGE_KINDS.indexOf(b.kind));
}

/** Ids of the rows that differ: those that get a change bar in the margin. */
export function changedRows(changes: readonly Change[]): string[] {
	return [...new Set(changes.map(({ row }) => row))];
}

function compareAllRows(before: readonly DocumentRow[], after: readonly DocumentRow[]): Change[] {
	const old = new Map(before.map((entry) => [entry.row.id, entry]));
	const ids = new Set(after.map((entry) => entry.row.id));
	return [
		...after.flatMap((entry) => {
			const was = old.get(entry.row.id);
			return was === undefined ? [wholeRow('added', entry)] : compareRows(was, entry);
		}),
		...before.filter(({ row }) => !ids.has(row.id)).map((entry) => wholeRow('removed', entry))
	];
}

function wholeRow(kind: 'added' | 'removed', entry: DocumentRow): Change {
	const numbers = numbersOf(entry);
	return {
		kind,
		area: entry.kind === 'rating' ? 'rating' : 'guarantee',
		row: entry.row.id,
		label: entry.label,
		part: 'row',
		before: kind === 'removed' ? numbers : null,
		after: kind === 'added' ? numbers : null,
		relative: null
	};
}

function numbersOf(entry: DocumentRow): string {
	const { minimum, maximum } = entry.row;
	const typical = entry.kind === 'rating' ? null : entry.row.typical;
	const unit = entry.kind === 'capacitance' ? entry.section.unit : entry.row.unit;
	const texts = [
		...(minimum ? [`min ${minimum.text}`] : []),
		...(typical ? [`typ ${typical.text}`] : []),
		...(maximum ? [`max ${maximum.text}`] : [])
	];
	return texts.length === 0 ? 'no value' : `${texts.join(', ')} ${unit}`;
}
