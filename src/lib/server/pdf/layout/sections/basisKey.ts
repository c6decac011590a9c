import type { DatasheetDocument, DocumentSection } from '../../../../core/datasheet/document';
import { symbolRuns } from '../../../../core/datasheet/symbolRuns';
import { BASES, BASIS_MARKS, BASIS_WORDS, type Basis } from '../../../../core/limits/basis';
import { TERMS, type Block } from '../flow';
import { MEASURE } from '../paper';
import { STATUS_MARKS, type Sheet } from '../sheet';
import { STYLES } from '../styles';
import { breakLines, linkSpan, paragraphBoxes, richSpans, textSpan, type Span } from '../typeset';

/** What links to the capacitance table call it. */
export const CAPACITANCE_TABLE = 'capacitance-table';

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
	/** The section with the terms in full, where it is another one. */
	terms: DocumentSection | null
): Block | null {
	const present = BASES.filter((basis) => bases.includes(basis));
	const status = STATUS_MARKS[sheet.document.status];
	if (present.length === 0 && status === null) return null;
	const note = sheet.structure.add('Note', sheet.structure.root);
	const leads = terms !== null && present.length > 0 && hasTerms(sheet.document);
	return noteBlock(
		[
			...(status === null ? [] : entry(status.mark, status.word, true)),
			...present.flatMap((basis) =>
				entry(BASIS_MARKS[basis], BASIS_WORDS[basis], basis !== 'typical')
			),
			...(leads
				? [
						linkSpan(`Terms: ${termsName(terms)}`, STYLES.footnote, {
							to: TERMS,
							tag: sheet.structure.add('Link', note)
						})
					]
				: [])
		],
		note
	);
}

const termsName = (section: DocumentSection) =>
	section.kind === 'characteristics' || section.kind === 'thermal'
		? section.heading
		: 'capacitance table';

/** The terms of every basis in full, then the statements that hold for all tables. */
function fullTerms(sheet: Sheet): Block | null {
	const { basisNotes, footnotes } = sheet.document;
	if (!hasTerms(sheet.document)) return null;
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

const hasTerms = ({ basisNotes, footnotes }: DatasheetDocument) =>
	basisNotes.length > 0 || footnotes.length > 0;

/** Where the terms stand in full: below the first capacitance table, else below the last table with marks. */
export function termsSection({ sections }: DatasheetDocument): DocumentSection | null {
	const isThere = (section: DocumentSection) => 'rows' in section && section.rows.length > 0;
	return (
		sections.find((section) => section.kind === 'capacitance-table' && isThere(section)) ??
		sections.findLast(
			(section) =>
				(section.kind === 'characteristics' || section.kind === 'thermal') && isThere(section)
		) ??
		null
	);
}

/** The terms below this section's table, or where they stand instead. */
export function termsBelow(
	section: DocumentSection,
	sheet: Sheet
): { readonly terms: Block | null; readonly elsewhere: DocumentSection | null } {
	const place = termsSection(sheet.document);
	return place === section
		? { terms: fullTerms(sheet), elsewhere: null }
		: { terms: null, elsewhere: place };
}

/** What a basis mark in this section's rows leads to, when its terms stand in another section. */
export function termsLink(section: DocumentSection, sheet: Sheet): string | undefined {
	const place = termsSection(sheet.document);
	return place === null || place === section || !hasTerms(sheet.document) ? undefined : TERMS;
}
