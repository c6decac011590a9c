import type { DatasheetDocument } from '../../../../core/datasheet/document';
import { symbolRuns } from '../../../../core/datasheet/symbolRuns';
import { BASES, BASIS_MARKS, BASIS_WORDS, type Basis } from '../../../../core/limits/basis';
import type { Block } from '../flow';
import { MEASURE } from '../paper';
import { STATUS_MARKS, type Sheet } from '../sheet';
import { STYLES } from '../styles';
import { breakLines, paragraphBoxes, richSpans, textSpan, type Span } from '../typeset';

/** First baseline below the table's last rule, and what is left below the last line, in pt. */
const FIRST = 10.4;
const BELOW = 2.6;

function noteBlock(spans: readonly Span[], tag: number | null): Block {
	const lines = breakLines(spans, MEASURE);
	const { leading } = STYLES.footnote;
	return {
		height: FIRST + (lines.length - 1) * leading + BELOW,
		boxes: paragraphBoxes(lines, { tag, x: 0, y: FIRST }, leading)
	};
}

/** Mark, no-break space, words, and a gap: entries break between each other only where they must. */
const entry = (mark: string, words: string, isLetter: boolean): Span[] => [
	textSpan(mark, isLetter ? STYLES.footnoteMark : STYLES.footnote),
	textSpan('\u00a0\u00a0' + words.replaceAll(' ', '\u00a0'), STYLES.footnote),
	textSpan('\u00a0\u00a0\u00a0\u00a0\u00a0 ', STYLES.footnote)
];

/** The short key of the marks that a table carries; `null` when it carries none. */
export function shortKey(
	sheet: Sheet,
	bases: readonly (Basis | null)[],
	options: { readonly termsAreElsewhere: boolean }
): Block | null {
	const present = BASES.filter((basis) => bases.includes(basis));
	const status = STATUS_MARKS[sheet.document.status];
	if (present.length === 0 && status === null) return null;
	const hasNotes = sheet.document.basisNotes.length > 0;
	return noteBlock(
		[
			...(status === null ? [] : entry(status.mark, status.word, true)),
			...present.flatMap((basis) =>
				entry(BASIS_MARKS[basis], BASIS_WORDS[basis], basis !== 'typical')
			),
			...(options.termsAreElsewhere && hasNotes && present.length > 0
				? [textSpan('Terms: capacitance table', STYLES.footnote)]
				: [])
		],
		sheet.structure.add('Note', sheet.structure.root)
	);
}

/** The terms of every basis in full, then the statements that hold for all tables. */
export function fullTerms(sheet: Sheet): Block | null {
	const { basisNotes, footnotes } = sheet.document;
	if (basisNotes.length === 0 && footnotes.length === 0) return null;
	const status = STATUS_MARKS[sheet.document.status];
	const spans = [
		...(status === null ? [] : [...termSpans(status.mark, `${status.word}.`)]),
		...basisNotes.flatMap(({ basis, mark, text }) =>
			termSpans(mark, sentence(text), basis === 'typical')
		),
		...footnotes.flatMap((text) => [
			...richSpans(symbolRuns(sentence(text)), STYLES.footnote),
			textSpan(' ', STYLES.footnote)
		])
	];
	return noteBlock(spans, sheet.structure.add('Note', sheet.structure.root));
}

const termSpans = (mark: string, text: string, isPlain = false): Span[] => [
	textSpan(mark, isPlain ? STYLES.footnote : STYLES.footnoteMark),
	textSpan('\u00a0\u00a0', STYLES.footnote),
	...richSpans(symbolRuns(text), STYLES.footnote),
	textSpan('  ', STYLES.footnote)
];

const sentence = (text: string) => (/[.!?]$/.test(text) ? text : `${text}.`);

/** Whether the terms stand below the capacitance table; else they go below the last table with marks. */
export const hasCapacitanceTable = (document: DatasheetDocument) =>
	document.sections.some((section) => section.kind === 'capacitance-table');
