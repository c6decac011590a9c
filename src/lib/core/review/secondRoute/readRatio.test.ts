import { expect, it } from 'vitest';
import { readRatio } from './readRatio';

function block(set: number, grid: readonly number[], rows: readonly (readonly number[])[]) {
	const bytes = new Uint8Array(rows.length * grid.length * 8);
	const view = new DataView(bytes.buffer);
	for (const [at, value] of rows.flat().entries()) view.setFloat64(at * 8, value, true);
	return {
		set,
		firstRow: 0,
		grid,
		unitScale: 1e-12,
		bytes,
		devices: {
			lot: rows.map(() => 'A'),
			wafer: rows.map(() => '1'),
			site: rows.map((_, row) => `s${row}`),
			element: rows.map(() => ''),
			name: rows.map(() => 'D')
		}
	};
}

it('divides within each device, whichever sets hold its two readings', () => {
	const blocks = [
		block(
			1,
			[1, 28],
			[
				[15, 2],
				[16, 2.5],
				[15, NaN],
				[12, 3]
			]
		),
		block(2, [28], [[4]])
	];
	const found = readRatio(blocks, [1, 28], (set, row) => set === 1 && row === 3);
	// Device 0 has 2 pF and 4 pF at 28 V: the mean counts.
	expect(found.map(({ device, value }) => [device, Number(value.toPrecision(12))])).toEqual([
		['D', 5],
		['D', 6.4]
	]);
});
