import { moveBoxes, type Box } from '../box';
import type { Block, Section } from '../flow';
import { GUTTER, mm } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { STYLES } from '../styles';
import { axisFor, headBlock, rowBlock, rowRule, textCell, type Column } from '../table';
import { breakLines, paragraphBoxes, textSpan } from '../typeset';
import { HALF } from './halfFigures';
import { closedTable } from './outline';
import { sectionHead } from './sectionHead';

/** What links to the model call it. */
export const MODEL = 'model';

/** First baseline of the text, and hang of what goes on below a long line, in pt. */
const TEXT = { first: 9, hang: 10 };

type Model = SectionOf<'model'>;

/** Parameters at the left, the text of the model file at the right; it says itself how well it fits. */
export function model(section: Model, sheet: Sheet): Section {
	const { structure } = sheet;
	const head = sectionHead(section.heading, section.conditions, { structure });
	const table = parameterTable(section, sheet);
	const text = textBlock(section, sheet);
	return {
		title: section.heading,
		anchor: MODEL,
		gapBefore: 'section',
		head,
		continued: null,
		parts: [
			{
				kind: 'block',
				block: {
					height: Math.max(table.height, text.height),
					boxes: [...table.boxes, ...moveBoxes(text.boxes, HALF + GUTTER, 0)]
				}
			}
		]
	};
}

function parameterTable({ parameters }: Model, sheet: Sheet): Block {
	const { structure } = sheet;
	const table = structure.add('Table', structure.root);
	const head = (text: string) => [textSpan(text, STYLES.tableHead)];
	const columns: readonly Column[] = [
		{ x: 0, width: mm(11), set: 'text', head: head('Name') },
		{ x: mm(12), width: mm(45), set: 'text', head: head('Parameter') },
		{
			x: mm(57),
			width: mm(15),
			set: 'decimal',
			head: head('Value'),
			axis: axisFor(parameters.map(({ value }) => value.text))
		},
		{ x: mm(73), width: mm(11), set: 'text', head: head('Unit') }
	];
	return closedTable(
		headBlock(columns, { structure, table, width: HALF }),
		parameters.map(({ name, meaning, value, unit }) =>
			rowBlock(
				columns,
				[
					textCell(name, STYLES.bodyBold),
					textCell(meaning, STYLES.body),
					{ kind: 'number', text: value.text },
					textCell(unit, STYLES.body)
				],
				{
					structure,
					table,
					header: 0,
					rule: rowRule(),
					isChanged: sheet.changed.has(`model.${name}`)
				}
			)
		)
	);
}

/** The lines of the file as they are; a long one goes on below, indented. */
function textBlock({ text }: Model, sheet: Sheet): Block {
	const { structure } = sheet;
	const { leading } = STYLES.code;
	const boxes: Box[] = [];
	let y = TEXT.first;
	const tag = structure.add('P', structure.root);
	for (const line of text.trimEnd().split('\n')) {
		const lines = breakLines([textSpan(line, STYLES.code)], HALF - TEXT.hang);
		lines.forEach((each, at) => {
			boxes.push(...paragraphBoxes([each], { tag, x: at === 0 ? 0 : TEXT.hang, y }, leading));
			y += leading;
		});
	}
	return { height: y - leading + 3, boxes };
}
