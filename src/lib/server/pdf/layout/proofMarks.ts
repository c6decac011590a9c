import type { PublicationRecord } from '../../../core/datasheet/record';
import type { DatasheetDocument } from '../../../core/datasheet/document';
import { moveBoxes, type Box, type Tag } from './box';
import { MEASURE, mm, type Paper } from './paper';
import { statusWords } from './statusWords';
import { STYLES } from './styles';
import { stateBoxes, stateBoxWidth } from './table';
import { lineBoxes, oneLine, piece, textSpan } from './typeset';

const BAR = { top: mm(4.6), height: mm(6.4), baseline: mm(8.75) };
const MARGIN_STARTS = [mm(24), mm(114), mm(204)];
const MARGIN_FROM_RIGHT = mm(8.2);
const TICK = { inset: mm(3), length: mm(7) };

/** What a proof is a proof of. */
const KINDS = { draft: 'open draft', review: 'revision in review' } as const;

/**
 * The marks of a sheet that must not leave the house, on every page: black bar, the word down the
 * right margin three times, ticks at the corners. Nothing lies under the numbers.
 */
export function proofMarks(
	document: DatasheetDocument,
	record: PublicationRecord,
	paper: Paper,
	tag: Tag
): Box[] {
	if (record.kind === 'release') return [];
	const { word, date } = statusWords(document.status, record);
	const name = oneLine([
		textSpan(word, STYLES.banner),
		textSpan('\u00a0\u00a0\u00a0', STYLES.bannerText),
		textSpan('not for release', STYLES.bannerText)
	]);
	const what = oneLine([
		textSpan(
			`${KINDS[record.kind]} of ${document.partNumber}, ${date}, content ${record.contentHash.slice(0, 12)}`,
			STYLES.bannerText
		)
	]);
	const isCrowded = name.width + what.width + 24 > MEASURE;
	const short = oneLine([
		textSpan(`${date}, content ${record.contentHash.slice(0, 12)}`, STYLES.bannerText)
	]);
	return [
		...moveBoxes(
			[
				{
					kind: 'rectangle',
					tag: null,
					x: 0,
					y: BAR.top,
					width: MEASURE,
					height: BAR.height,
					fill: 'black'
				},
				...lineBoxes(name, { tag, x: mm(2.4), y: BAR.baseline, ink: 'white' }),
				...lineBoxes(isCrowded ? short : what, {
					tag,
					x: MEASURE - mm(2.4),
					y: BAR.baseline,
					align: 'right',
					ink: 'white'
				})
			],
			paper.left,
			0
		),
		...MARGIN_STARTS.filter((start) => start + mm(50) < paper.height).flatMap((start) =>
			marginWords(word, start, paper)
		),
		...cornerTicks(paper)
	];
}

/** The word and its note, set downwards outside the measure. */
function marginWords(word: string, start: number, paper: Paper): Box[] {
	const x = paper.width - MARGIN_FROM_RIGHT;
	const large = piece(word, STYLES.marginWord);
	return [
		{ kind: 'text', tag: null, x, y: start, pieces: [large], turned: true },
		{
			kind: 'text',
			tag: null,
			x: x + 1.6,
			y: start + large.width + 9,
			pieces: [piece('not for release', STYLES.marginNote)],
			turned: true
		}
	];
}

function cornerTicks(paper: Paper): Box[] {
	const { inset, length } = TICK;
	return [0, 1].flatMap((right) =>
		[0, 1].flatMap((low) => {
			const x = right ? paper.width - inset : inset;
			const y = low ? paper.height - inset : inset;
			const line = (to: readonly [number, number]): Box => ({
				kind: 'rule',
				tag: null,
				from: [x, y],
				to,
				weight: 0.35
			});
			return [line([right ? x - length : x + length, y]), line([x, low ? y - length : y + length])];
		})
	);
}

/** Explains the marks of a proof once, at the foot of its first page. */
export function proofKey(): Box[] {
	const y = 11;
	const stale = { text: 'stale', isDashed: false };
	const unbound = { text: 'unbound', isDashed: true };
	const boxes: Box[] = [];
	let x = 0;
	const words = (
		text: string,
		style = STYLES.footnote as (typeof STYLES)['footnote' | 'footnoteBold']
	) => {
		const line = oneLine([textSpan(text, style)]);
		boxes.push(...lineBoxes(line, { tag: null, x, y }));
		x += line.width;
	};
	const box = (label: typeof stale) => {
		boxes.push(...stateBoxes(label, x, y));
		x += stateBoxWidth(label) + 2;
	};
	words('Proof marks:\u00a0', STYLES.footnoteBold);
	words('dotted underline, digits bound to a limit\u00a0\u00a0·\u00a0\u00a0');
	box(stale);
	words('\u00a0newer data has moved it\u00a0\u00a0·\u00a0\u00a0');
	box(unbound);
	words('\u00a0nothing bound to the slot');
	return boxes;
}

/** What the key needs at the foot of the first page. */
export const PROOF_KEY_HEIGHT = 15;
