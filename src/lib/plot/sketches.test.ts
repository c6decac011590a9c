import { describe, expect, it } from 'vitest';
import { TERMINAL_GRAPHICS, TEST_CIRCUITS } from '../core/template/template';
import { circuitSketch } from './circuitSketch';
import { extentOf, type Sketch } from './sketch';
import { terminalSketch } from './terminalSketch';

const MM = 72 / 25.4;
const texts = ({ marks }: Sketch) =>
	marks.flatMap((mark) => (mark.kind === 'text' ? [mark.text] : []));
/** Filled triangles and bars aside: closed paths of three corners. */
const triangles = ({ marks }: Sketch) =>
	marks.filter(
		(mark) => mark.kind === 'path' && mark.steps.length === 4 && mark.steps[3]?.to === 'close'
	);

describe.each(TEST_CIRCUITS)('the circuit %s', (circuit) => {
	const sketch = circuitSketch(circuit);

	it('fits half the measure of the sheet', () => {
		expect(sketch.width).toBeLessThanOrEqual(84 * MM);
		expect(extentOf(sketch.marks).left).toBeCloseTo(1, 6);
	});

	it('has one device under test', () => {
		expect(triangles(sketch)).toHaveLength(1);
		expect(texts(sketch).join(' ')).toMatch(/device.*under test/);
	});
});

it('biases the capacitance of a device in reverse: its cathode is at the source’s upper end', () => {
	const [triangle] = triangles(circuitSketch('capacitance'));
	if (triangle?.kind !== 'path') throw new Error('no device');
	const ys = triangle.steps.flatMap((step) => ('at' in step ? [step.at[1]] : []));
	expect(ys[0]).toBeLessThan(Math.min(...ys.slice(1)));
});

describe.each(TERMINAL_GRAPHICS)('the terminals of a %s', (graphic) => {
	const sketch = terminalSketch({ graphic, numbers: ['1', '2'], hasBand: true, marking: 'K4' });

	it('fit a third of the measure and carry numbers and code', () => {
		expect(sketch.width).toBeLessThanOrEqual(54 * MM);
		expect(texts(sketch)).toEqual(['1', '2', 'K4', '1', '2']);
	});

	it('have no band and no code on a body that has none', () => {
		const bare = terminalSketch({ graphic, numbers: ['1', '2'], hasBand: false, marking: null });
		expect(texts(bare)).toEqual(['1', '2', '1', '2']);
		expect(bare.marks.length).toBe(sketch.marks.length - 2);
	});
});
