import { versionText } from '../../../../core/datasheet/record';
import type { Box } from '../box';
import type { Block } from '../flow';
import { MEASURE, mm } from '../paper';
import type { Sheet } from '../sheet';
import { statusWords } from '../statusWords';
import { RULES, STYLES } from '../styles';
import { breakLines, lineBoxes, oneLine, paragraphBoxes, piece, textSpan } from '../typeset';

/** Places below the masthead's upper edge, in pt. */
const MAKER = mm(7.3);
const PART = mm(24.35);
const TO_CLASS = mm(7.3);
const TO_DESCRIPTION = mm(6.4);
const TO_PLATE = 16.6;
const STATUS = { x: mm(120), values: mm(141), first: mm(20.5), pitch: 15.5, ruleBelow: 5 };

const WIDTH = mm(114);
const DESCRIPTION_WIDTH = mm(96);
/** A part number too long for its line is set smaller, down to this, then broken. */
const SMALLEST_PART = 15;

/** Part number, class and description between two plates; the status block at the right. */
export function masthead(sheet: Sheet): Block {
	const { document, structure } = sheet;
	const part = partNumber(document.partNumber);
	const partEnd = PART + (part.lines.length - 1) * part.leading;
	const classAt = partEnd + TO_CLASS;
	const classLines = breakLines([textSpan(document.className, STYLES.className)], WIDTH);
	const classEnd = classAt + (classLines.length - 1) * STYLES.className.leading;
	const descriptionAt = classEnd + TO_DESCRIPTION;
	const description = breakLines(
		[textSpan(document.description, STYLES.description)],
		DESCRIPTION_WIDTH
	);
	const descriptionEnd =
		descriptionAt + Math.max(description.length - 1, 0) * STYLES.description.leading;
	const partTag = structure.add('H1', structure.root);
	const classTag = structure.add('P', structure.root);
	const descriptionTag = structure.add('P', structure.root);
	const status = statusBlock(sheet);
	const plate = Math.max(descriptionEnd, status.end) + TO_PLATE;

	return {
		height: plate + RULES.plate / 2,
		boxes: [
			plateBox(RULES.plate / 2, 'black'),
			...lineBoxes(oneLine([textSpan(document.organization.name, STYLES.maker)]), {
				tag: structure.add('P', structure.root),
				x: 0,
				y: MAKER
			}),
			...paragraphBoxes(part.lines, { tag: partTag, x: -0.6, y: PART }, part.leading),
			...paragraphBoxes(classLines, { tag: classTag, x: 0, y: classAt }, STYLES.className.leading),
			...paragraphBoxes(
				description,
				{ tag: descriptionTag, x: 0, y: descriptionAt },
				STYLES.description.leading
			),
			...status.boxes,
			plateBox(plate, 'verdigris')
		]
	};
}

const plateBox = (y: number, ink: 'black' | 'verdigris'): Box => ({
	kind: 'rule',
	tag: null,
	from: [0, y],
	to: [MEASURE, y],
	weight: RULES.plate,
	ink
});

function partNumber(text: string) {
	const { size } = STYLES.partNumber;
	const { width } = piece(text, STYLES.partNumber);
	const fitted = Math.max(Math.min(size, (size * WIDTH) / width), SMALLEST_PART);
	const style = { ...STYLES.partNumber, size: fitted, tracking: -0.012 * fitted };
	return { lines: breakLines([textSpan(text, style)], WIDTH), leading: fitted * 1.12 };
}

function statusBlock(sheet: Sheet): { boxes: Box[]; end: number } {
	const { structure, record } = sheet;
	const words = statusWords(sheet.document.status, record);
	const table = structure.add('Table', structure.root);
	const isRelease = record.kind === 'release';
	const rows: [string, string][] = [
		['Version', words.version],
		['Date', words.date],
		...(record.previous === null
			? []
			: [
					[
						isRelease ? 'Supersedes' : 'Replaces',
						`${versionText(record.previous.version)} of ${record.previous.date}`
					] as [string, string]
				]),
		['Content hash', record.contentHash.slice(0, 12)]
	];
	const boxes: Box[] = [];
	const label = (text: string, row: number, y: number) =>
		lineBoxes(oneLine([textSpan(text, STYLES.statusLabel)]), {
			tag: structure.add('TH', row, { scope: 'Row' }),
			x: STATUS.x,
			y
		});

	const first = structure.add('TR', table);
	boxes.push(...label('Status', first, STATUS.first));
	const cell = structure.add('TD', first);
	boxes.push({
		kind: 'disc',
		tag: null,
		x: STATUS.values + 2.6,
		y: STATUS.first - 2.9,
		radius: 2.6,
		look: words.disc
	});
	boxes.push(
		...lineBoxes(
			oneLine([
				textSpan(words.word, STYLES.statusWord),
				...(words.addition === '' ? [] : [textSpan(words.addition, STYLES.statusValue)])
			]),
			{ tag: cell, x: STATUS.values + mm(3.4), y: STATUS.first }
		)
	);

	rows.forEach(([name, value], at) => {
		const y = STATUS.first + (at + 1) * STATUS.pitch;
		const row = structure.add('TR', table);
		boxes.push(
			{
				kind: 'rule',
				tag: null,
				from: [STATUS.x, y - STATUS.pitch + STATUS.ruleBelow],
				to: [MEASURE, y - STATUS.pitch + STATUS.ruleBelow],
				weight: RULES.row,
				ink: 'grey'
			},
			...label(name, row, y),
			...lineBoxes(oneLine([textSpan(value, STYLES.statusValue)]), {
				tag: structure.add('TD', row),
				x: STATUS.values,
				y
			})
		);
	});
	return { boxes, end: STATUS.first + rows.length * STATUS.pitch - 2 };
}
