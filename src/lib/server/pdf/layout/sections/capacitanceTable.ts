import { symbolRuns } from '../../../../core/datasheet/symbolRuns';
import type { CapacitanceRow } from '../../../../core/datasheet/document';
import type { Box } from '../box';
import type { Block, Section } from '../flow';
import { MEASURE, mm } from '../paper';
import { stateLabel, statusMark, type SectionOf, type Sheet } from '../sheet';
import { RULES, STYLES } from '../styles';
import {
	axisFor,
	groupThousands,
	headBoxes,
	rowBlock,
	rowRule,
	strongRule,
	type Cell,
	type Column
} from '../table';
import { lineBoxes, oneLine, richSpans, textSpan } from '../typeset';
import { CAPACITANCE_TABLE, shortKey, termsBelow } from './basisKey';
import { continuedHead, sectionHead } from './sectionHead';

/** Two lines of heads: names of the spans, a rule beneath, the columns; in pt. */
const HEAD = { spanBaseline: 7.6, spanRule: 10.8, baseline: 19.4, height: 23.6 };
/** How far a span's rule reaches into its last column. */
const SPAN_END = mm(13.8);
const STATE_X = mm(11.5);

type Key = 'bias' | 'minimum' | 'typical' | 'maximum' | 'below' | 'above' | 'ratio' | 'basis';
interface PlacedColumn extends Column {
	readonly key: Key;
}

/** Texts of a column, with thousands grouped throughout where one needs it. */
function columnTexts(section: SectionOf<'capacitance-table'>) {
	const of = (pick: (row: CapacitanceRow) => { readonly text: string } | null) =>
		groupThousands(section.rows.map((row) => pick(row)?.text ?? null));
	return {
		bias: of((row) => row.bias),
		minimum: of((row) => row.minimum),
		typical: of((row) => row.typical),
		maximum: of((row) => row.maximum),
		below: of((row) => row.deviationMinimum),
		above: of((row) => row.deviationMaximum),
		ratio: of((row) => row.ratio)
	};
}

function columnsOf(
	section: SectionOf<'capacitance-table'>,
	texts: ReturnType<typeof columnTexts>
): PlacedColumn[] {
	const head = (text: string) => [textSpan(text, STYLES.tableHead)];
	const number = (key: Exclude<Key, 'basis'>, x: number, width: number, name: string) => ({
		key,
		x: mm(x),
		width: mm(width),
		set: 'decimal' as const,
		head: head(name),
		axis: axisFor(texts[key])
	});
	return [
		{
			...number('bias', 0, 22, ''),
			head: richSpans(symbolRuns('V_R in V'), STYLES.tableHead),
			style: STYLES.bodyBold
		},
		number('minimum', 22, 20, 'Min'),
		number('typical', 42, 20, 'Typ'),
		number('maximum', 62, 20, 'Max'),
		number('below', 82, 27, 'Min'),
		number('above', 109, 27, 'Max'),
		...(section.ratioTo === null ? [] : [number('ratio', 136, 26, 'Typ')]),
		{ key: 'basis', x: mm(162), width: mm(12), set: 'centre', head: head('Basis') }
	];
}

/** Capacitance at each bias, with its deviation from typical, its ratio and its basis. */
export function capacitanceTable(section: SectionOf<'capacitance-table'>, sheet: Sheet): Section {
	const { structure } = sheet;
	const head = sectionHead(section.heading, section.conditions, { structure });
	const table = structure.add('Table', structure.root);
	const texts = columnTexts(section);
	const columns = columnsOf(section, texts);
	const heads = spannedHead(section, columns, sheet, table);
	const limit = statusMark(sheet, 'limit');
	const typical = statusMark(sheet, 'typical');

	const cell = (key: Key, row: CapacitanceRow, at: number): Cell => {
		if (key === 'basis') return { kind: 'basis', basis: row.basis };
		const mark =
			key === 'minimum' || key === 'maximum' ? limit : key === 'typical' ? typical : null;
		return { kind: 'number', text: texts[key][at] ?? null, mark };
	};
	const { terms, elsewhere } = termsBelow(section, sheet);
	return {
		title: section.heading,
		anchor: CAPACITANCE_TABLE,
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
					return rowBlock(
						columns,
						columns.map(({ key }) => cell(key, row, at)),
						{
							structure,
							table,
							header: 0,
							rule: at % 5 === 0 ? strongRule() : rowRule(),
							isChanged: sheet.changed.has(row.id),
							state: label === null ? null : { label, x: STATE_X }
						}
					);
				}),
				key: shortKey(
					sheet,
					section.rows.map(({ basis }) => basis),
					elsewhere
				),
				terms
			}
		]
	};
}

/** Heads in two lines: `C_tot in pF` over three columns, deviation over two, the ratio over one. */
function spannedHead(
	section: SectionOf<'capacitance-table'>,
	columns: readonly PlacedColumn[],
	sheet: Sheet,
	table: number
): Block {
	const { structure } = sheet;
	const [upper, lower] = [structure.add('TR', table), structure.add('TR', table)];
	const boxes: Box[] = [];
	const whole = (column: PlacedColumn) => {
		const tag = structure.add('TH', upper, { scope: 'Column', rowSpan: 2 });
		boxes.push(...headBoxes(column, tag, HEAD.baseline));
	};
	const span = (words: string, keys: readonly Key[]) => {
		const covered = columns.filter(({ key }) => keys.includes(key));
		const [first, last] = [covered[0], covered.at(-1)];
		if (!first || !last) return;
		const tag = structure.add('TH', upper, { scope: 'Column', columnSpan: covered.length });
		const [from, to] = [first.x, last.x + SPAN_END];
		boxes.push(
			...lineBoxes(oneLine(richSpans(symbolRuns(words), STYLES.tableHead)), {
				tag,
				x: (from + to) / 2,
				y: HEAD.spanBaseline,
				align: 'centre'
			})
		);
		if (covered.length > 1)
			boxes.push({
				kind: 'rule',
				tag: null,
				from: [from, HEAD.spanRule],
				to: [to, HEAD.spanRule],
				weight: RULES.row
			});
		for (const column of covered)
			boxes.push(
				...headBoxes(column, structure.add('TH', lower, { scope: 'Column' }), HEAD.baseline)
			);
	};

	for (const column of columns) {
		if (column.key === 'bias' || column.key === 'basis') whole(column);
		if (column.key === 'bias') {
			span(`C_tot in ${section.unit}`, ['minimum', 'typical', 'maximum']);
			span('from typical, in %', ['below', 'above']);
			span(`C_tot(V_R) / C_tot(${section.ratioTo ?? 0}\u00a0V)`, ['ratio']);
		}
	}
	return {
		height: HEAD.height,
		boxes: [
			...boxes,
			{
				kind: 'rule',
				tag: null,
				from: [0, HEAD.height],
				to: [MEASURE, HEAD.height],
				weight: RULES.table
			}
		]
	};
}
