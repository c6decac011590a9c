import { leftOutOfChart } from '../../../../plot/capacitanceChart';
import { printTheme } from '../../../../plot/chartTheme';
import type { Section } from '../flow';
import { MEASURE } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { STYLES } from '../styles';
import { linkSpan, richSpans, textSpan, type Span } from '../typeset';
import { CAPACITANCE_TABLE } from './basisKey';
import { figureBlock } from './figure';
import { sectionHead } from './sectionHead';

/** The capacitance chart below its caption, over the whole measure. */
export function capacitanceChartSection(
	section: SectionOf<'capacitance-chart'>,
	sheet: Sheet,
	place: { readonly figure: number; readonly isChanged: boolean }
): Section {
	const { structure } = sheet;
	const head = sectionHead(section.heading, section.conditions, { structure });
	const marks = sheet.charts.get(section);
	const { width, height } = printTheme;
	const block = figureBlock(
		{
			number: place.figure,
			width: MEASURE,
			caption: (tag) => [
				...richSpans(section.caption, STYLES.caption, sheet.isProof),
				...remark(section, marks !== undefined, () => structure.add('Link', tag))
			],
			drawing: marks === undefined ? null : { width, height, marks },
			alternative: alternative(section),
			isChanged: place.isChanged
		},
		structure
	);
	return {
		title: section.heading,
		gapBefore: 'section',
		head,
		continued: null,
		parts: [{ kind: 'block', block }]
	};
}

/** What the caption adds: that there is no curve, or which rows stand in the table only. */
function remark(
	{ points }: SectionOf<'capacitance-chart'>,
	hasCurve: boolean,
	linkTag: () => number
): Span[] {
	if (!hasCurve)
		return [
			textSpan(' No curve: fewer than two positive biases have a typical value.', STYLES.caption)
		];
	const leftOut = leftOutOfChart(points);
	if (leftOut === null) return [];
	const reference = 'see the table';
	const [before = '', after = ''] = leftOut.split(reference);
	return [
		textSpan(` ${before}`, STYLES.caption),
		linkSpan(reference, STYLES.caption, { to: CAPACITANCE_TABLE, tag: linkTag() }),
		textSpan(after, STYLES.caption)
	];
}

function alternative(section: SectionOf<'capacitance-chart'>): string {
	const points = section.points.filter(({ bias }) => bias > 0);
	const [first, last] = [points[0], points.at(-1)];
	return (
		`Chart of total capacitance against reverse voltage, both axes logarithmic, with typical curve, ` +
		`minimum and maximum. Typical ${first?.typical} ${section.unit} at ${first?.bias} V, ` +
		`${last?.typical} ${section.unit} at ${last?.bias} V; all values stand in the capacitance table.`
	);
}
