import { expect, it } from 'vitest';
import { readColumn, type PackedBlock } from './readColumn';

function block(set: number, rows: readonly (readonly number[])[], names: string[]): PackedBlock {
	const bytes = new Uint8Array(rows.length * 2 * 8 + 3);
	// Not aligned to eight bytes, as a blob inside a larger buffer is not.
	const inner = bytes.subarray(3);
	const view = new DataView(inner.buffer, inner.byteOffset);
	rows.flat().forEach((value, i) => view.setFloat64(i * 8, value, true));
	const same = (text: string) => names.map(() => text);
	return {
		set,
		firstRow: 2048 * (set - 1),
		grid: [1, 4],
		unitScale: 1e-12,
		bytes: inner,
		devices: { lot: same('A'), wafer: same('01'), site: same(''), element: same(''), name: names }
	};
}

const values = (found: ReturnType<typeof readColumn>) =>
	found.map(({ device, value }) => [device, Number((value / 1e-12).toPrecision(12))]);

it('reads one bias, leaves out what is absent and what it is told to', () => {
	const blocks = [
		block(
			1,
			[
				[20, 10],
				[21, NaN],
				[22, 12]
			],
			['1', '2', '3']
		)
	];
	expect(values(readColumn(blocks, 4, () => false))).toEqual([
		['1', 10],
		['3', 12]
	]);
	expect(values(readColumn(blocks, 4, (set, row) => set === 1 && row === 2))).toEqual([['1', 10]]);
	expect(readColumn(blocks, 2, () => false)).toEqual([]);
});

it('counts a device of two sets once, with the mean of its values', () => {
	const blocks = [block(1, [[20, 10]], ['1']), block(2, [[20, 11]], ['1'])];
	expect(values(readColumn(blocks, 4, () => false))).toEqual([['1', 10.5]]);
	expect(values(readColumn(blocks, 4, (set, row) => set === 2 && row === 2048))).toEqual([
		['1', 10]
	]);
});
