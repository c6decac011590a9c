import { versionText, type PublicationRecord } from '../../../../core/datasheet/record';
import { symbolRuns } from '../../../../core/datasheet/symbolRuns';
import { sheetTexts } from '../../../../core/messages/datasheet';
import type { Row, Section } from '../flow';
import { MEASURE, mm } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { STYLES } from '../styles';
import { headBlock, rowBlock, rowRule, textCell, type Cell, type Column } from '../table';
import { richSpans, textSpan } from '../typeset';
import { continuedHead, sectionHead } from './sectionHead';

type Entry = PublicationRecord['history'][number];
type Change = NonNullable<Entry['list']>[number];

const column = (head: string, from: number, width: number): Column => ({
	x: mm(from),
	width: mm(width),
	set: 'text',
	head: head === '' ? [] : [textSpan(head, STYLES.tableHead)]
});

const VERSION = column('Version', 0, 12);
const DATE = column('Date', 13, 20);
const WHAT_CHANGED = column('What changed', 34, 140);
const CHANGES = [
	VERSION,
	DATE,
	column('Change', 34, 21),
	column('What', 56, 66),
	column('Before', 123, 25),
	column('Now', 149, 25)
] as const;
/** Where the rules of the differences begin: what is left of it stands in the row above. */
const CHANGE_X = mm(34);
/** More differences than this are counted instead of listed. */
const MOST_LISTED = 24;

/**
 * Versions, newest first, each in a person's words and, where the record has them, with its
 * differences one by one; `null` before the first release.
 */
export function revisionHistory(
	section: SectionOf<'revision-history'>,
	sheet: Sheet
): Section | null {
	const { structure, record } = sheet;
	if (record.history.length === 0) return null;
	const head = sectionHead(section.heading, '', { structure });
	const table = structure.add('Table', structure.root);
	const isListed = record.history.some(({ list = [] }) => list.length > 0);
	const heads = headBlock(isListed ? CHANGES : [VERSION, DATE, WHAT_CHANGED], { structure, table });
	return {
		title: section.heading,
		gapBefore: 'section',
		head,
		continued: continuedHead(section.heading),
		parts: [
			{
				kind: 'table',
				width: MEASURE,
				head: heads,
				rows: record.history.flatMap((entry, at) =>
					entryRows(entry, { sheet, table, isNewest: at === 0, isListed })
				),
				key: null,
				terms: null
			}
		]
	};
}

interface EntryPlace {
	readonly sheet: Sheet;
	readonly table: number;
	readonly isNewest: boolean;
	/** Whether the table has columns for single differences. */
	readonly isListed: boolean;
}

function entryRows({ version, date, changes, list = [] }: Entry, place: EntryPlace): Row[] {
	const { structure } = place.sheet;
	const common = { structure, table: place.table, header: 0 } as const;
	const listed = list.slice(0, MOST_LISTED);
	const further = list.length - listed.length;
	const covered = listed.length + (further > 0 ? 1 : 0) + 1;
	const first = rowBlock(
		[VERSION, DATE, WHAT_CHANGED],
		[
			textCell(versionText(version), place.isNewest ? STYLES.bodyBold : STYLES.body),
			textCell(date, STYLES.body),
			{ kind: 'text', spans: richSpans(symbolRuns(changes), STYLES.body) }
		],
		{
			...common,
			rule: rowRule(),
			...(covered > 1 && { spans: { 0: covered, 1: covered } }),
			...(place.isListed && { columnSpans: { 2: 4 } }),
			...(listed.length > 0 && { keepWithNext: true })
		}
	);
	const below = { ...common, header: 3, rule: rowRule(CHANGE_X) };
	return [
		first,
		...listed.map((change) => rowBlock(CHANGES, [COVERED, COVERED, ...changeCells(change)], below)),
		...(further > 0
			? [
					rowBlock(
						[VERSION, DATE, WHAT_CHANGED],
						[COVERED, COVERED, textCell(sheetTexts.furtherChanges(further), STYLES.body)],
						{ ...below, columnSpans: { 2: 4 } }
					)
				]
			: [])
	];
}

const COVERED: Cell = { kind: 'covered' };

function changeCells({ kind, label, before, after }: Change): Cell[] {
	return [
		textCell(kind, STYLES.body),
		{ kind: 'text', spans: richSpans(symbolRuns(label), STYLES.body) },
		textCell(before ?? '–', STYLES.body),
		textCell(after ?? '–', STYLES.body)
	];
}
