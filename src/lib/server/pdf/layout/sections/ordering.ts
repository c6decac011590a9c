import type { Section } from '../flow';
import { mm } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { STYLES } from '../styles';
import { groupThousands, headBlock, rowBlock, rowRule, textCell, type Column } from '../table';
import { textSpan } from '../typeset';
import { continuedHead, sectionHead } from './sectionHead';

const column = (
	head: string,
	from: number,
	width: number,
	set: Column['set'] = 'text'
): Column => ({
	x: mm(from),
	width: mm(width),
	set,
	head: [textSpan(head, STYLES.tableHead)]
});

const COLUMNS: readonly Column[] = [
	column('Ordering code', 0, 37),
	column('Package', 39, 20),
	column('Grade', 61, 28),
	column('Marking', 91, 20),
	column('Packing', 113, 38),
	column('Quantity', 152, 22, 'right')
];

/** Ordering codes with package, grade, marking and packing. */
export function ordering(section: SectionOf<'ordering'>, sheet: Sheet): Section {
	const { structure } = sheet;
	const head = sectionHead(section.heading, '', { structure });
	const table = structure.add('Table', structure.root);
	const quantities = groupThousands(section.rows.map(({ quantity }) => String(quantity)));
	return {
		title: section.heading,
		gapBefore: 'section',
		head,
		continued: continuedHead(section.heading),
		parts: [
			{
				kind: 'table',
				width: mm(174),
				head: headBlock(COLUMNS, { structure, table }),
				rows: section.rows.map((row, at) =>
					rowBlock(
						COLUMNS,
						[
							textCell(row.code, STYLES.bodyBold),
							textCell(row.package, STYLES.body),
							textCell(row.grade, STYLES.body),
							textCell(row.marking, STYLES.body),
							textCell(row.packing, STYLES.body),
							textCell(quantities[at] ?? '', STYLES.body)
						],
						{
							structure,
							table,
							header: 0,
							rule: rowRule(),
							isChanged: sheet.changed.has(`ordering.${row.code}`)
						}
					)
				),
				key: null,
				terms: null
			}
		]
	};
}
