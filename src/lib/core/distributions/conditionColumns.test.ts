import { describe, expect, it } from 'vitest';
import { ConditionColumns } from './conditionColumns';
import { indexDevices } from './indexDevices';

const devices = (names: string[], lot = 'L1') => ({
	lot: names.map(() => lot),
	wafer: names.map(() => '01'),
	site: names.map(() => '0/0'),
	element: names.map(() => ''),
	name: names
});
const none = () => false;

describe('two sets that share a device', () => {
	const index = indexDevices(
		[
			{ set: 1, chunks: [{ chunk: 0, devices: devices(['a', 'b']) }] },
			{ set: 2, chunks: [{ chunk: 0, devices: devices(['b', 'c']) }] }
		],
		4,
		new Map([['L1', 'WL-9']])
	);

	it('count it once', () => {
		expect(index.deviceCount).toBe(3);
		expect(index.groups).toEqual([{ lot: 'L1', wafer: '01', waferLot: 'WL-9' }]);
		expect(index.devicesOf.get(2)).toEqual(Int32Array.of(1, 2));
	});

	it('average it, in SI', () => {
		const columns = new ConditionColumns(index);
		const matrix = { firstRow: 0, grid: [0, 4], unitScale: 0.5 };
		columns.add({ ...matrix, set: 1, values: Float64Array.of(1, 2, 3, 4) }, none);
		columns.add({ ...matrix, set: 2, values: Float64Array.of(7, Number.NaN, 9, 10) }, none);
		expect(columns.columns()).toEqual([
			{ bias: 0, values: Float64Array.of(0.5, 2.5, 4.5), sets: [1, 2] },
			{ bias: 4, values: Float64Array.of(1, 2, 5), sets: [1, 2] }
		]);
	});

	it('leave out the rows that are to be left out', () => {
		const columns = new ConditionColumns(index);
		columns.add(
			{ set: 1, firstRow: 0, grid: [0], unitScale: 1, values: Float64Array.of(1, 2) },
			(row) => row === 0
		);
		expect(columns.columns()[0]?.values).toEqual(Float64Array.of(Number.NaN, 2, Number.NaN));
	});
});

it('finds the rows of a later chunk where they are counted over the set', () => {
	const index = indexDevices(
		[
			{
				set: 1,
				chunks: [
					{ chunk: 0, devices: devices(['a']) },
					{ chunk: 1, devices: devices(['b']) }
				]
			}
		],
		2,
		new Map()
	);
	expect(index.devicesOf.get(1)).toEqual(Int32Array.of(0, -1, 1));
	const columns = new ConditionColumns(index);
	columns.add({ set: 1, firstRow: 2, grid: [1], unitScale: 1, values: Float64Array.of(5) }, none);
	expect(columns.columns()[0]?.values).toEqual(Float64Array.of(Number.NaN, 5));
});

it('takes a lot without genealogy for its own wafer lot', () => {
	const index = indexDevices(
		[{ set: 1, chunks: [{ chunk: 0, devices: devices(['a'], 'L7') }] }],
		2,
		new Map()
	);
	expect(index.groups[0]?.waferLot).toBe('L7');
});

it('orders biases by their value, forward ones first', () => {
	const index = indexDevices(
		[{ set: 1, chunks: [{ chunk: 0, devices: devices(['a']) }] }],
		2,
		new Map()
	);
	const columns = new ConditionColumns(index);
	const values = Float64Array.of(3, 2, 1);
	columns.add({ set: 1, firstRow: 0, grid: [10, 0, -0.2], unitScale: 1, values }, none);
	expect(columns.columns().map(({ bias }) => bias)).toEqual([-0.2, 0, 10]);
});
