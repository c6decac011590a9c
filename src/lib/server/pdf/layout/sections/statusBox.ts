import type { Block } from '../flow';
import { MEASURE } from '../paper';
import type { Sheet } from '../sheet';
import { STYLES } from '../styles';
import { breakLines, paragraphBoxes, superscript, textSpan, type Span } from '../typeset';

const INSET = 7.5;

const text = (words: string) => textSpan(words, STYLES.boxText);

/** What a sheet that isn't a production one says of its numbers, below the masthead. */
const STATEMENTS: Record<'preliminary' | 'target', readonly Span[]> = {
	preliminary: [
		textSpan('PRELIMINARY', STYLES.boxWord),
		text('\u00a0\u00a0\u00a0Limits marked '),
		{ pieces: [superscript('p', STYLES.bodyBold)], actual: 'p' },
		text(
			' are provisional: they rest on few lots and may change without a change notice. Not for the release of equipment to production.'
		)
	],
	target: [
		textSpan('TARGET', STYLES.boxWord),
		text('\u00a0\u00a0\u00a0Numbers marked '),
		{ pieces: [superscript('t', STYLES.bodyBold)], actual: 't' },
		text(
			' are aims of the development: no measurement stands behind them, and they may change without notice. Not for the release of equipment to production.'
		)
	]
};

/** The boxed statement of a preliminary or target datasheet; `null` for a production one. */
export function statusBox(sheet: Sheet): Block | null {
	const { status } = sheet.document;
	if (status === 'production') return null;
	const lines = breakLines(STATEMENTS[status], MEASURE - 2 * INSET);
	const { leading } = STYLES.boxText;
	const height = 12.2 + (lines.length - 1) * leading + 6.6;
	return {
		height,
		boxes: [
			{
				kind: 'rectangle',
				tag: null,
				x: 0,
				y: 0,
				width: MEASURE,
				height,
				stroke: 'black',
				weight: 0.75
			},
			...paragraphBoxes(
				lines,
				{ tag: sheet.structure.add('P', sheet.structure.root), x: INSET, y: 12.2 },
				leading
			)
		]
	};
}
