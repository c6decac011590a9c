import type { Section } from '../flow';
import { numberColumns, STATE_END, STATE_X } from '../numberColumns';
import { MEASURE } from '../paper';
import { stateLabel, statusMark, type SectionOf, type Sheet } from '../sheet';
import { STYLES } from '../styles';
import { groupThousands, headBlock, rowBlock, rowRule, stateBoxWidth, textCell } from '../table';
import { richSpans, symbolSpan } from '../typeset';
import { shortKey } from './basisKey';
import { continuedHead, sectionHead } from './sectionHead';

/** Limiting values: what a person typed and answers for; no typical value, no basis. */
export function ratings(section: SectionOf<'ratings'>, sheet: Sheet): Section {
	const { structure } = sheet;
	const head = sectionHead(section.heading, section.note, { structure });
	const table = structure.add('Table', structure.root);
	const minimum = groupThousands(section.rows.map((row) => row.minimum?.text ?? null));
	const maximum = groupThousands(section.rows.map((row) => row.maximum?.text ?? null));
	const columns = numberColumns(
		{ name: 'Rating', typical: '', basis: '' },
		{ minimum, typical: [], maximum }
	);
	const mark = statusMark(sheet, 'limit');
	const heads = headBlock(columns, { structure, table });
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
				rows: section.rows.map((row, at) => {
					const label = stateLabel(sheet, row.state);
					const hasValue = row.minimum !== null || row.maximum !== null;
					return rowBlock(
						columns,
						[
							{ kind: 'text', spans: [symbolSpan(row.symbol, STYLES.body)] },
							textCell(row.name, STYLES.body),
							{ kind: 'text', spans: richSpans(row.conditions, STYLES.body, sheet.isProof) },
							{ kind: 'number', text: minimum[at] ?? null, mark },
							{ kind: 'empty' },
							{ kind: 'number', text: maximum[at] ?? null, mark },
							textCell(row.unit, STYLES.body),
							{ kind: 'empty' }
						],
						{
							structure,
							table,
							header: 1,
							rule: rowRule(),
							isChanged: sheet.changed.has(row.id),
							state:
								label === null
									? null
									: { label, x: hasValue ? STATE_END - stateBoxWidth(label) : STATE_X }
						}
					);
				}),
				key: shortKey(sheet, [], null),
				terms: null
			}
		]
	};
}
