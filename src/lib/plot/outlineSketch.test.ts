import { describe, expect, it } from 'vitest';
import { PACKAGES } from '../core/outline/packages';
import { landSketch, outlineSketch } from './outlineSketch';
import { extentOf, type Sketch } from './sketch';

/** Half the measure of the printed sheet, in pt. */
const ROOM = { width: (84 * 72) / 25.4, height: (62 * 72) / 25.4 };

const written = ({ marks }: Sketch) =>
	marks.flatMap((mark) => (mark.kind === 'text' ? [mark.text] : []));

describe.each(PACKAGES.map((known) => [known.name, known] as const))('%s', (_, known) => {
	const outline = outlineSketch(known, ROOM);
	const land = landSketch(known, ROOM);

	it('fits its room and begins at the corner', () => {
		for (const sketch of [outline, land]) {
			if (sketch === null) throw new Error('no land pattern');
			const { left, top, right, bottom } = extentOf(sketch.marks);
			expect(left).toBeCloseTo(1, 6);
			expect(top).toBeCloseTo(1, 6);
			expect(right).toBeLessThanOrEqual(ROOM.width);
			expect(bottom).toBeLessThanOrEqual(ROOM.height);
		}
	});

	it('has the letters of its table beside their lines', () => {
		for (const { symbol } of known.dimensions) {
			expect(written(outline)).toContain(symbol.quantity);
			if (symbol.subscript !== undefined) expect(written(outline)).toContain(symbol.subscript);
		}
		expect(land === null ? [] : written(land)).toEqual(
			expect.arrayContaining(known.land.map(({ symbol }) => symbol.quantity))
		);
	});

	it('has two arrowheads a dimension', () => {
		const heads = outline.marks.filter(
			(mark) => mark.kind === 'path' && mark.stroke === null && mark.steps.length === 4
		);
		expect(heads).toHaveLength(known.dimensions.length * 2);
	});
});

it('is drawn ten times as large where the room allows, the smallest twenty times', () => {
	const scales = Object.fromEntries(
		PACKAGES.map((known) => [known.name, outlineSketch(known, ROOM).scale])
	);
	expect(scales).toMatchObject({ 'SOD-323': 10, '0402': 20 });
	expect(scales['DO-214AA']).toBeLessThan(10);
});
