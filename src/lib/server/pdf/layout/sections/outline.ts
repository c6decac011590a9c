import { symbolText } from '../../../../core/characteristics/symbol';
import { landSketch, outlineSketch, type ScaledSketch } from '../../../../plot/outlineSketch';
import { moveBoxes, type Box } from '../box';
import { stackHeight, type Block, type Row, type Section } from '../flow';
import { GUTTER, mm } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { sketchMarks } from '../sketchMarks';
import { RULES, STYLES } from '../styles';
import { axisFor, headBlock, rowBlock, rowRule, textCell, type Column } from '../table';
import { symbolSpan, textSpan } from '../typeset';
import { figureBlock, stacked, type Figure } from './figure';
import { HALF } from './halfFigures';
import { sectionHead } from './sectionHead';

type Outline = SectionOf<'outline'>;

/** Room of the drawings, and space between them and between the two tables. */
const ROOM = { outline: mm(66), land: mm(48) };
const BETWEEN = { figures: 10, tables: 8 };

/** Drawings at the left, their dimensions in mm at the right. */
export function outline(section: Outline, sheet: Sheet, nextNumber: () => number): Section {
	const { structure } = sheet;
	const head = sectionHead(section.heading, `package ${section.package}; dimensions in mm`, {
		structure
	});
	const drawings = stacked(
		figuresOf(section, sheet, nextNumber).map((figure, at) => ({
			block: figureBlock(figure, structure),
			gap: at === 0 ? 0 : BETWEEN.figures
		}))
	);
	const tables = stacked([
		{ block: dimensionTable(section, sheet), gap: 0 },
		...(section.land.length === 0
			? []
			: [{ block: landTable(section, sheet), gap: BETWEEN.tables }])
	]);
	return {
		title: section.heading,
		gapBefore: 'section',
		head,
		continued: null,
		parts: [
			{
				kind: 'block',
				block: {
					height: Math.max(drawings.height, tables.height),
					boxes: [...drawings.boxes, ...moveBoxes(tables.boxes, HALF + GUTTER, 0)]
				}
			}
		]
	};
}

function figuresOf(section: Outline, sheet: Sheet, nextNumber: () => number): Figure[] {
	const figure = (
		sketch: ScaledSketch,
		words: string,
		alternative: string,
		prefix: string
	): Figure => ({
		number: nextNumber(),
		width: HALF,
		caption: () => [
			textSpan(
				`${words} ${sketch.scale}\u00a0:\u00a01, from the nominal dimensions; illustrative`,
				STYLES.caption
			)
		],
		drawing: { width: sketch.width, height: sketch.height, marks: sketchMarks(sketch) },
		alternative,
		isChanged: [...sheet.changed].some((id) => id.startsWith(prefix))
	});
	const listed = (
		of: readonly {
			readonly symbol: Outline['dimensions'][number]['symbol'];
			readonly name: string;
			readonly nominal: string;
		}[]
	) =>
		of.map(({ symbol, name, nominal }) => `${symbolText(symbol)} ${name} ${nominal} mm`).join(', ');
	const drawn = outlineSketch(section, { width: HALF, height: ROOM.outline });
	const land = landSketch(section, { width: HALF, height: ROOM.land }, drawn.scale);
	return [
		figure(
			drawn,
			'Outline',
			`Outline of the package ${section.package} from above, from the side and from its end: ${listed(section.dimensions)}.`,
			'outline.'
		),
		...(land === null
			? []
			: [
					figure(
						land,
						'Suggested land pattern',
						`Land pattern for the package ${section.package}: ${listed(section.land)}.`,
						'outline.land.'
					)
				])
	];
}

const column = (head: string, from: number, width: number): Column => ({
	x: mm(from),
	width: mm(width),
	set: 'text',
	head: [textSpan(head, STYLES.tableHead)]
});

const numbers = (head: string, from: number, texts: readonly (string | null)[]): Column => ({
	x: mm(from),
	width: mm(13),
	set: 'decimal',
	head: [textSpan(head, STYLES.tableHead)],
	axis: axisFor(texts)
});

function dimensionTable({ dimensions }: Outline, sheet: Sheet): Block {
	return smallTable(
		[
			column('Outline', 0, 12),
			column('Dimension', 13, 31),
			numbers('Min', 45, []),
			numbers('Nom', 58, []),
			numbers('Max', 71, [])
		],
		dimensions.map(({ symbol, name, minimum, nominal, maximum }) => ({
			id: `outline.${symbolText(symbol)}`,
			symbol,
			name,
			values: [minimum, nominal, maximum]
		})),
		sheet
	);
}

function landTable({ land }: Outline, sheet: Sheet): Block {
	return smallTable(
		[column('Land', 0, 12), column('Dimension', 13, 31), numbers('Nom', 58, [])],
		land.map(({ symbol, name, nominal }) => ({
			id: `outline.land.${symbolText(symbol)}`,
			symbol,
			name,
			values: [nominal]
		})),
		sheet
	);
}

interface SmallRow {
	readonly id: string;
	readonly symbol: Outline['dimensions'][number]['symbol'];
	readonly name: string;
	readonly values: readonly (string | null)[];
}

/** A table of half the measure, which is never broken. */
function smallTable(columns: readonly Column[], rows: readonly SmallRow[], sheet: Sheet): Block {
	const { structure } = sheet;
	const table = structure.add('Table', structure.root);
	const head = headBlock(columns, { structure, table, width: HALF });
	const blocks = rows.map(({ id, symbol, name, values }) =>
		rowBlock(
			columns,
			[
				{ kind: 'text', spans: [symbolSpan(symbol, STYLES.body)] },
				textCell(name, STYLES.body),
				...values.map((text) => ({ kind: 'number' as const, text }))
			],
			{
				structure,
				table,
				header: 1,
				rule: rowRule(),
				isChanged: sheet.changed.has(id)
			}
		)
	);
	return closedTable(head, blocks);
}

/** Head and rows as one block, with the rules between rows and the one below the last. */
export function closedTable(head: Block, rows: readonly Row[]): Block {
	const height = head.height + stackHeight(rows);
	let y = head.height;
	const boxes = rows.flatMap((row, at): Box[] => {
		const rule: Box[] =
			at === 0 || row.rule === null
				? []
				: [
						{
							kind: 'rule',
							tag: null,
							from: [row.rule.from, y],
							to: [HALF, y],
							weight: row.rule.weight,
							...(row.rule.isGrey && { ink: 'grey' as const })
						}
					];
		const moved = moveBoxes(row.boxes, 0, y);
		y += row.height;
		return [...rule, ...moved];
	});
	return {
		height,
		boxes: [
			...head.boxes,
			...boxes,
			{ kind: 'rule', tag: null, from: [0, height], to: [HALF, height], weight: RULES.table }
		]
	};
}
