import { expect, it } from 'vitest';
import { readReadings, type ReadingBlock } from './readReadings';

function block(set: number, values: readonly number[], flags: readonly number[]): ReadingBlock {
	const bytes = new Uint8Array(values.length * 8);
	const view = new DataView(bytes.buffer);
	values.forEach((value, i) => view.setFloat64(i * 8, value, true));
	const same = (text: string) => values.map(() => text);
	return {
		set,
		firstRow: 0,
		unitScale: 1e-9,
		bytes,
		flags: Uint8Array.from(flags, (flag) => flag & 255),
		devices: {
			lot: same('A1'),
			wafer: same('01'),
			site: same(''),
			element: same(''),
			name: values.map((_, i) => String(i))
		}
	};
}

it('reads values in SI, counts what is censored, leaves out what it is told to', () => {
	const found = readReadings(
		[block(1, [2, 0.1, NaN, 4], [0, -1, 0, 0])],
		(_, row) => row === 3,
		new Map([['A1', 'A']])
	);
	expect(found.devices.map(({ waferLot, device }) => [waferLot, device])).toEqual([
		['A', '0'],
		['A', '1']
	]);
	expect(found.devices[0]?.value).toBeCloseTo(2e-9, 20);
	expect(found.devices[1]?.value).toBeCloseTo(1e-10, 20);
	expect(found.censored).toBe(1);
});

it('takes the mean of what a device was read several times', () => {
	const found = readReadings([block(1, [2], [0]), block(2, [4], [0])], () => false, new Map());
	expect(found.devices.map(({ value }) => value)).toEqual([3.0000000000000004e-9]);
});
