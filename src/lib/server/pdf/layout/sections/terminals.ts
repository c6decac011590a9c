import { terminalSketch } from '../../../../plot/terminalSketch';
import type { Box } from '../box';
import type { Block } from '../flow';
import { THIRD } from '../paper';
import type { SectionOf, Sheet } from '../sheet';
import { sketchMarks } from '../sketchMarks';
import { STYLES } from '../styles';
import { breakLines, paragraphBoxes, textSpan } from '../typeset';
import { sectionHead } from './sectionHead';

const ABOVE_DRAWING = 2;
const BELOW_DRAWING = 12;

/** Graphic symbol, body from above, and which terminal is which; stands in a column like a list. */
export function terminalsColumn(section: SectionOf<'terminals'>, x: number, sheet: Sheet): Block {
	const { structure } = sheet;
	const { heading, graphic, terminals, hasBand, marking } = section;
	const head = sectionHead(heading, '', { structure, x, width: THIRD });
	const [first, second] = terminals;
	const sketch = terminalSketch({
		graphic,
		numbers: [first?.number ?? '1', second?.number ?? '2'],
		hasBand,
		marking
	});
	const alternative = `Graphic symbol and body from above: ${terminals
		.map(({ number, name }) => `terminal ${number} is the ${name}`)
		.join(', ')}.`;
	const boxes: Box[] = [
		...head.boxes,
		{
			kind: 'drawing',
			tag: structure.add('Figure', structure.root, { alternative }),
			x,
			y: head.height + ABOVE_DRAWING,
			width: sketch.width,
			height: sketch.height,
			marks: sketchMarks(sketch)
		}
	];
	const { leading } = STYLES.list;
	let y = head.height + ABOVE_DRAWING + sketch.height + BELOW_DRAWING;
	const lines = [
		...terminals.map(({ number, name }) => [
			textSpan(number, STYLES.listBold),
			textSpan(`\u00a0\u00a0${name}`, STYLES.list)
		]),
		marking === null
			? [textSpan('Marking code: see ordering', STYLES.list)]
			: [
					textSpan('Marking code ', STYLES.list),
					textSpan(marking, STYLES.listBold),
					textSpan('; body seen from above', STYLES.list)
				]
	];
	for (const spans of lines) {
		const broken = breakLines(spans, THIRD);
		boxes.push(
			...paragraphBoxes(broken, { tag: structure.add('P', structure.root), x, y }, leading)
		);
		y += broken.length * leading;
	}
	return { height: y - leading + 3, boxes };
}
