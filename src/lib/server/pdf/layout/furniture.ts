import { versionText, type PublicationRecord } from '../../../core/datasheet/record';
import type { DatasheetDocument } from '../../../core/datasheet/document';
import { moveBoxes, type Box } from './box';
import { GUTTER, MEASURE, mm, THIRD, type Paper } from './paper';
import { statusWords } from './statusWords';
import { RULES, STYLES } from './styles';
import { breakLines, lineBoxes, oneLine, textSpan, type TextStyle } from './typeset';

export interface PageNumber {
	/** From 1. */
	readonly page: number;
	readonly pages: number;
}

/** One line of running text; a running head and foot are artifacts in the tag tree. */
const running = (
	text: string,
	style: TextStyle,
	x: number,
	y: number,
	align: 'left' | 'right' = 'left'
): Box[] => lineBoxes(oneLine([textSpan(text, style)]), { tag: null, x, y, align });

const widthOf = (text: string, style: TextStyle) => oneLine([textSpan(text, style)]).width;

/** Part and class at the left, status, version and date at the right; not on the first page. */
export function runningHead(
	document: DatasheetDocument,
	record: PublicationRecord,
	paper: Paper
): Box[] {
	const words = statusWords(document.status, record);
	// A proof's bar reaches down to the head's usual place.
	const y = paper.headBaseline + (record.kind === 'release' ? 0 : mm(0.8));
	const version = record.version === null ? words.version : `version ${words.version}`;
	const right = `${version}\u00a0\u00a0\u00a0\u00a0\u00a0${words.date}`;
	const rightWidth = widthOf(right, STYLES.running);
	const wordWidth = widthOf(words.word, STYLES.runningStatus);
	const wordX = MEASURE - rightWidth - 14 - wordWidth;
	const room = wordX - 24;
	const natural = widthOf(document.partNumber, STYLES.runningPart);
	const size = STYLES.runningPart.size * Math.min(1, room / natural);
	const part = { ...STYLES.runningPart, size };
	const partWidth = widthOf(document.partNumber, part);
	const hasRoomForClass = partWidth + 7 + widthOf(document.className, STYLES.running) <= room;
	return moveBoxes(
		[
			...running(document.partNumber, part, 0, y),
			...(hasRoomForClass ? running(document.className, STYLES.running, partWidth + 7, y) : []),
			{ kind: 'disc', tag: null, x: wordX - 6, y: y - 2.5, radius: 2.2, look: words.disc },
			...running(words.word, STYLES.runningStatus, wordX, y),
			...running(right, STYLES.running, MEASURE, y, 'right'),
			{
				kind: 'rule',
				tag: null,
				from: [0, paper.headRule],
				to: [MEASURE, paper.headRule],
				weight: RULES.table
			}
		],
		paper.left,
		0
	);
}

/** Maker and key of the change bars, content hash, page number. */
export function runningFoot(
	document: DatasheetDocument,
	record: PublicationRecord,
	paper: Paper,
	{ page, pages }: PageNumber
): Box[] {
	const y = paper.footBaseline;
	const maker = breakLines([textSpan(document.organization.name, STYLES.running)], THIRD)[0];
	const makerWidth = maker?.width ?? 0;
	const hasBars = record.changedRows.length > 0 && record.previous !== null;
	return moveBoxes(
		[
			{
				kind: 'rule',
				tag: null,
				from: [0, paper.footRule],
				to: [MEASURE, paper.footRule],
				weight: RULES.foot
			},
			...(maker ? lineBoxes(maker, { tag: null, x: 0, y }) : []),
			...(hasBars && record.previous
				? [
						{
							kind: 'rule' as const,
							tag: null,
							from: [makerWidth + 10, y - 6.2] as const,
							to: [makerWidth + 10, y + 0.6] as const,
							weight: 1.5
						},
						...running(
							`changed since ${versionText(record.previous.version)}`,
							STYLES.running,
							makerWidth + 15,
							y
						)
					]
				: []),
			...running(
				`content hash ${record.contentHash.slice(0, 12)}`,
				STYLES.running,
				THIRD + GUTTER + 33,
				y
			),
			...running(`page ${page} of ${pages}`, STYLES.running, MEASURE, y, 'right')
		],
		paper.left,
		0
	);
}
