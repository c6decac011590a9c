import { versionText } from '../../../../core/datasheet/record';
import { symbolRuns } from '../../../../core/datasheet/symbolRuns';
import type { Section } from '../flow';
import { MEASURE, mm } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { STYLES } from '../styles';
import { headBlock, rowBlock, rowRule, textCell, type Column } from '../table';
import { richSpans, textSpan } from '../typeset';
import { continuedHead, sectionHead } from './sectionHead';

const column = (head: string, from: number, width: number): Column => ({
	x: mm(from),
	width: mm(width),
	set: 'text',
	head: [textSpan(head, STYLES.tableHead)]
});

const COLUMNS = [
	column('Version', 0, 12),
	column('Date', 13, 20),
	column('What changed', 34, 140)
] as const;

/** Versions, newest first; `null` before the first release. */
export function revisionHistory(
	section: SectionOf<'revision-history'>,
	sheet: Sheet
): Section | null {
	const { structure, record } = sheet;
	if (record.history.length === 0) return null;
	const head = sectionHead(section.heading, '', { structure });
	const table = structure.add('Table', structure.root);
	const heads = headBlock(COLUMNS, { structure, table });
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
				rows: record.history.map(({ version, date, changes }, at) =>
					rowBlock(
						COLUMNS,
						[
							textCell(versionText(version), at === 0 ? STYLES.bodyBold : STYLES.body),
							textCell(date, STYLES.body),
							{ kind: 'text', spans: richSpans(symbolRuns(changes), STYLES.body) }
						],
						{ structure, table, header: 0, rule: rowRule() }
					)
				),
				key: null,
				terms: null
			}
		]
	};
}
