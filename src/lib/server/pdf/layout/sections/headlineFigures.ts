import { BASIS_MARKS, type Basis } from '../../../../core/limits/basis';
import type { Box } from '../box';
import type { Block } from '../flow';
import { GUTTER, QUARTER } from '../paper';
import { stateLabel, STATUS_MARKS, type SectionOf, type Sheet } from '../sheet';
import { RULES, STYLES } from '../styles';
import { stateBoxes } from '../table';
import {
	breakLines,
	lineBoxes,
	oneLine,
	paragraphBoxes,
	richSpans,
	textSpan,
	type Span
} from '../typeset';

const BASELINE = 21.6;
const TO_LABEL = 12.2;

/** Digits are set large, words between them and units small: `23.5 to 26.6 pF`. */
function figureSpans(figure: string, unit: string): Span[] {
	const tokens = figure.split(' ').filter((token) => token !== '');
	return [...tokens, ...(unit === '' ? [] : [unit])].flatMap((token, at) => {
		const isNumber = at < tokens.length && /^[+\u2212-]?[\d.\u00a0]+$/.test(token);
		const style = isNumber ? STYLES.figure : STYLES.figureWord;
		return at === 0
			? [textSpan(token, style)]
			: [textSpan(' ', STYLES.figure), textSpan(token, style)];
	});
}

/** The few numbers a reader looks for first, in quarters of the measure. */
export function headlineFigures(section: SectionOf<'headline-figures'>, sheet: Sheet): Block {
	const { structure } = sheet;
	let height = BASELINE + TO_LABEL + 3;
	const boxes = section.figures.flatMap((figure, at): Box[] => {
		const x = (at % 4) * (QUARTER + GUTTER);
		const line = oneLine(figureSpans(figure.figure, figure.unit));
		const state = stateLabel(sheet, sheet.states.get(figure.slot));
		const label = breakLines(
			[...richSpans(figure.label, STYLES.figureLabel), ...standing(figure.basis, sheet)],
			QUARTER
		);
		height = Math.max(
			height,
			BASELINE + TO_LABEL + (label.length - 1) * STYLES.figureLabel.leading + 3
		);
		const paragraph = structure.add('P', structure.root);
		return [
			{ kind: 'rule', tag: null, from: [x, 0], to: [x + QUARTER, 0], weight: RULES.row },
			...lineBoxes(line, { tag: paragraph, x, y: BASELINE }),
			...(state === null
				? []
				: stateBoxes(state, x + line.width + (line.width > 0 ? 6 : 0), BASELINE)),
			...paragraphBoxes(
				label,
				{ tag: structure.add('P', structure.root), x, y: BASELINE + TO_LABEL },
				STYLES.figureLabel.leading
			)
		];
	});
	return { height, boxes };
}

/** What stands behind a headline figure: its basis mark, or that a limit is only provisional. */
function standing(basis: Basis | null, sheet: Sheet): Span[] {
	const status = STATUS_MARKS[sheet.document.status];
	if (basis === 'typical' && !status?.marksTypical) return [];
	if (status) return [textSpan(`, ${status.word}`, STYLES.figureLabel)];
	if (basis === null || basis === 'typical') return [];
	return [
		textSpan(', ', STYLES.figureLabel),
		textSpan(BASIS_MARKS[basis], { ...STYLES.footnoteMark, size: STYLES.figureLabel.size })
	];
}
