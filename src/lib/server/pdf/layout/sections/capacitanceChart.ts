import { printTheme } from '../../../../plot/chartTheme';
import { leftOutOfChart } from '../../../../plot/capacitanceChart';
import type { Box } from '../box';
import type { Section } from '../flow';
import { MEASURE } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { STYLES } from '../styles';
import { changeBar } from '../table';
import { breakLines, linkSpan, paragraphBoxes, richSpans, textSpan, type Span } from '../typeset';
import { CAPACITANCE_TABLE } from './basisKey';
import { sectionHead } from './sectionHead';

const CAPTION = { first: 9, below: 4.3 };

/** The capacitance chart below its caption, over the whole measure. */
export function capacitanceChartSection(
	section: SectionOf<'capacitance-chart'>,
	sheet: Sheet,
	place: { readonly figure: number; readonly isChanged: boolean }
): Section {
	const { structure } = sheet;
	const head = sectionHead(section.heading, section.conditions, { structure });
	const marks = sheet.charts.get(section);
	const leftOut = leftOutOfChart(section.points);
	const captionTag = structure.add('Caption', structure.root);
	const caption = breakLines(
		[
			textSpan(`Fig.\u00a0${place.figure}`, STYLES.captionBold),
			textSpan('\u00a0\u00a0', STYLES.caption),
			...richSpans(section.caption, STYLES.caption, sheet.isProof),
			...(marks === undefined
				? [
						textSpan(
							' No curve: fewer than two positive biases have a typical value.',
							STYLES.caption
						)
					]
				: leftOut === null
					? []
					: leftOutSpans(leftOut, structure.add('Link', captionTag)))
		],
		MEASURE
	);
	const { leading } = STYLES.caption;
	const captionHeight = CAPTION.first + (caption.length - 1) * leading + CAPTION.below;
	const boxes: Box[] = [
		...paragraphBoxes(caption, { tag: captionTag, x: 0, y: CAPTION.first }, leading),
		...(place.isChanged
			? [
					changeBar(
						structure.add('Span', captionTag, { actualText: 'changed' }),
						0,
						captionHeight - 1
					)
				]
			: [])
	];
	if (marks)
		boxes.push({
			kind: 'drawing',
			tag: structure.add('Figure', structure.root, { alternative: alternative(section) }),
			x: 0,
			y: captionHeight,
			width: printTheme.width,
			height: printTheme.height,
			marks
		});
	return {
		title: section.heading,
		gapBefore: 'section',
		head,
		continued: null,
		parts: [
			{
				kind: 'block',
				block: { height: captionHeight + (marks ? printTheme.height : 0), boxes }
			}
		]
	};
}

/** The words of the left-out rows, of which *see the table* leads there. */
function leftOutSpans(words: string, tag: number): Span[] {
	const reference = 'see the table';
	const [before = '', after = ''] = words.split(reference);
	return [
		textSpan(` ${before}`, STYLES.caption),
		linkSpan(reference, STYLES.caption, { to: CAPACITANCE_TABLE, tag }),
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
