import type { DocumentSection } from '../../../../core/datasheet/document';
import { plainText } from '../../../../core/datasheet/plainText';
import { describeChart } from '../../../../plot/characteristicChart';
import { circuitSketch } from '../../../../plot/circuitSketch';
import { halfPrintTheme, printTheme } from '../../../../plot/chartTheme';
import { moveBoxes } from '../box';
import type { Section } from '../flow';
import { GUTTER, MEASURE, mm } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { sketchMarks } from '../sketchMarks';
import { STYLES } from '../styles';
import { richSpans, textSpan } from '../typeset';
import { figureBlock, stacked, type Figure } from './figure';
import { sectionHead } from './sectionHead';

/** Charts and circuits: sections that are one figure with a head of their own. */
export type FigureSection = SectionOf<'chart'> | SectionOf<'test-circuit'>;

export const HALF = mm(84);

export const isFigure = (section: DocumentSection): section is FigureSection =>
	section.kind === 'chart' || section.kind === 'test-circuit';

/** Whether it leaves room for another one beside it. */
export const isHalf = (section: DocumentSection): section is FigureSection =>
	isFigure(section) && (section.kind === 'test-circuit' || section.width === 'half');

/** One figure over the measure, or two side by side, each below its own rule and head. */
export function figureSection(
	sections: readonly FigureSection[],
	sheet: Sheet,
	nextNumber: () => number
): Section {
	const isSplit = sections.every(isHalf);
	const width = isSplit ? HALF : MEASURE;
	const columns = sections.map((section, at) => {
		const x = isSplit ? at * (HALF + GUTTER) : 0;
		const head = sectionHead(section.heading, '', { structure: sheet.structure, width });
		const figure = figureBlock(
			figureOf(section, sheet, { width, number: nextNumber() }),
			sheet.structure
		);
		const { height, boxes } = stacked([
			{ block: head, gap: 0 },
			{ block: figure, gap: 0 }
		]);
		return { height, boxes: moveBoxes(boxes, x, 0) };
	});
	return {
		title: sections.map(({ heading }) => heading).join(', '),
		gapBefore: 'section',
		head: null,
		continued: null,
		parts: [
			{
				kind: 'block',
				block: {
					height: Math.max(...columns.map(({ height }) => height)),
					boxes: columns.flatMap(({ boxes }) => boxes)
				}
			}
		]
	};
}

function figureOf(
	section: FigureSection,
	sheet: Sheet,
	place: { readonly width: number; readonly number: number }
): Figure {
	const caption = richSpans(section.caption, STYLES.caption, sheet.isProof);
	if (section.kind === 'test-circuit') {
		const sketch = circuitSketch(section.circuit);
		return {
			...place,
			caption: () => caption,
			drawing: { width: sketch.width, height: sketch.height, marks: sketchMarks(sketch) },
			alternative: `Circuit diagram: ${section.heading}. ${plainText(section.caption)}`,
			isChanged: sheet.changed.has(`test-circuit.${section.circuit}`)
		};
	}
	const marks = sheet.charts.get(section);
	const { width, height } = chartTheme(section);
	return {
		...place,
		caption: () =>
			marks === undefined ? [...caption, textSpan(NO_CURVE, STYLES.caption)] : caption,
		drawing: marks === undefined ? null : { width, height, marks },
		alternative: describeChart(section),
		isChanged: [...sheet.changed].some((id) => id.startsWith(`chart.${section.heading}`))
	};
}

const NO_CURVE = ' No curve: it has fewer than two points that the axes can show.';

/** How large a chart is drawn. */
export const chartTheme = (section: SectionOf<'chart'>) =>
	section.width === 'half' ? halfPrintTheme : printTheme;
