import { expect, it } from 'vitest';
import { placeLabels } from './placeLabels';

const FRAME = { width: 200, height: 150 };
const SIZE = 8;
const line = (from: number, to: number) =>
	Array.from({ length: 11 }, (_, at) => ({ x: at * 20, y: from + ((to - from) * at) / 10 }));

it('keeps labels in the frame and off every curve', () => {
	const curves = [
		{ points: line(140, 10), width: 60 },
		{ points: line(145, 60), width: 60 }
	];
	const spots = placeLabels(curves, FRAME, SIZE);
	expect(spots).toHaveLength(2);
	spots.forEach(({ label, align }, at) => {
		const left = align === 'left' ? label.x : label.x - 60;
		expect(left).toBeGreaterThanOrEqual(2);
		expect(left + 60).toBeLessThanOrEqual(FRAME.width - 2);
		for (const { points } of curves)
			for (const { x, y } of points)
				expect(
					x > left && x < left + 60 && y > label.y - 6 && y < label.y + 2,
					`label ${at} lies on ${x}, ${y}`
				).toBe(false);
	});
});

it('gives the same places to the same curves', () => {
	const curves = [{ points: line(140, 10), width: 60 }];
	expect(placeLabels(curves, FRAME, SIZE)).toEqual(placeLabels(curves, FRAME, SIZE));
});
