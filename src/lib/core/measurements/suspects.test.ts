import { describe, expect, it } from 'vitest';
import { measurementMessages } from '../messages/measurements';
import { repeatability } from './repeatability';
import { findSuspects } from './suspects';
import { SweepTable } from './sweepTable';
import type { ConditionSweeps } from './sweepTable';

/** Sweeps of devices D0, D1 … at 25 °C: one row a device, one column a bias. */
function sweepsOf(
	biases: readonly number[],
	rows: readonly (readonly number[])[],
	decimals: number
): { readonly condition: ConditionSweeps; readonly table: SweepTable } {
	const table = new SweepTable();
	for (const [index, row] of rows.entries()) {
		const device = table.deviceIndex({
			lot: 'A',
			wafer: '1',
			site: '',
			element: '',
			name: `D${index}`
		});
		for (const [column, value] of row.entries()) {
			table.condition(25, 1e6)?.add(device, biases[column] ?? Number.NaN, value, decimals);
		}
	}
	const [condition] = table.conditions();
	if (condition === undefined) throw new Error('no sweeps');
	return { condition, table };
}

const found = (
	biases: readonly number[],
	rows: readonly (readonly number[])[],
	decimals: number,
	lots = rows.map(() => 'A')
) => {
	const { condition, table } = sweepsOf(biases, rows, decimals);
	return findSuspects(condition, lots, repeatability([condition], table.deviceCount));
};

describe('outliers', () => {
	const LOT = [38.1, 38.4, 38.6, 38.5, 38.9, 38.3, 38.7, 38.2];

	// R: C <- c(38.1,38.4,38.6,38.5,38.9,38.3,38.7,38.2,30.0); y <- log(C); (y - median(y))/mad(y)
	// gives −31.8856046808 for the last and at most 1.671 for the others.
	it('finds the device that lies 31.9 robust standard deviations below its lot', () => {
		const suspects = found(
			[0],
			[...LOT, 30].map((value) => [value]),
			3
		);
		expect(suspects).toHaveLength(1);
		expect(suspects[0]).toMatchObject({
			device: 8,
			conditionKey: 'T=25;f=1000000',
			reason: { rule: 'outlier', bias: 0 }
		});
		const z = suspects[0]?.reason.robustZ ?? Number.NaN;
		expect(z / -31.8856046808).toBeCloseTo(1.4826 / 1.482602218505602, 10);
		expect(suspects[0]?.reason.text).toBe(
			measurementMessages.outlier({ what: 'ln C', z, bias: 0, beyond: 1, biases: 1, lot: 'A' })
		);
	});

	it('leaves a device at 5.9 robust standard deviations and takes one at 6.1', () => {
		// The lot's median is 38.5 (9 values) and its scale 0.007742054146 by R as above; the tried
		// device lies above the median, so it changes neither.
		const lot = [38.1, 38.4, 38.6, 38.5, 38.9, 38.3, 38.2, 38.45];
		const at = (z: number) => {
			const values = [...lot, 38.45 * Math.exp(z * scaleOf(lot))];
			return found(
				[0],
				values.map((value) => [value]),
				6
			).map(({ device }) => device);
		};
		expect(at(5.9)).toEqual([]);
		expect(at(6.1)).toEqual([8]);
	});

	it('judges quantized readings by their resolution where the deviation is 0', () => {
		// One step of 0.1 at 5.0 is 0.02: 5.5 lies ln(1.1)/0.02 = 4.77 steps away, 5.7 lies 6.55.
		const flat = Array.from({ length: 9 }, () => [5]);
		expect(found([0], [...flat, [5.5]], 1)).toEqual([]);
		expect(found([0], [...flat, [5.7]], 1)).toHaveLength(1);
		expect(found([0], [...flat, [5.7]], 1)[0]?.reason.robustZ).toBeCloseTo(6.5514, 4);
	});

	it('compares within the lot: a lot that lies elsewhere is no suspect', () => {
		const values = [...LOT, ...LOT.map((value) => value * 1.2)];
		const lots = values.map((_, index) => (index < LOT.length ? 'A' : 'B'));
		expect(
			found(
				[0],
				values.map((value) => [value]),
				3,
				lots
			)
		).toEqual([]);
	});

	it('does not judge a lot of four', () => {
		expect(found([0], [[38], [38.1], [38.2], [3]], 3)).toEqual([]);
	});

	it('names the worst bias and how many are beyond', () => {
		const rows = LOT.map((value) => [value, value / 3]);
		const [suspect] = found([0, 4], [...rows, [30, 7]], 3);
		expect(suspect?.reason).toMatchObject({ rule: 'outlier', bias: 4 });
		expect(suspect?.reason.text).toContain('beyond 6 at 2 of 2 biases');
	});
});

/** The scale of a lot with one device more above it, by hand: 1.4826 × the median deviation. */
function scaleOf(lot: readonly number[]): number {
	const median = Math.log(38.45);
	const deviations = [...lot.map((value) => Math.abs(Math.log(value) - median)), 1].sort(
		(a, b) => a - b
	);
	return 1.482602218505602 * (deviations[4] ?? Number.NaN);
}

describe('rises', () => {
	const BIASES = [0, 1, 2, 3, 4];
	const falling = (factor: number) => [40, 30, 24, 20, 17].map((value) => value * factor);
	const LOT = [1, 1.01, 0.99, 1.005, 0.995, 1.002].map(falling);

	it('finds a sweep in which capacitance rises, whatever order it was swept in', () => {
		const rising = [40, 30, 24, 24.6, 17];
		const [suspect] = found(BIASES, [...LOT, rising], 3).filter(
			({ reason }) => reason.rule === 'rises'
		);
		expect(suspect).toMatchObject({ device: 6, reason: { rule: 'rises', bias: 3 } });
		expect(suspect?.reason.text).toContain('2.5 % from 2 V to 3 V');

		const backwards = (row: readonly number[]) => [...row].reverse();
		const down = found(backwards(BIASES), [...LOT, rising].map(backwards), 3);
		expect(down.filter(({ reason }) => reason.rule === 'rises')).toHaveLength(1);
	});

	it('lets a rise of one step of the resolution pass, and takes one of two', () => {
		const flat = Array.from({ length: 8 }, () => [5, 5, 5, 5, 5]);
		const rises = (row: readonly number[]) =>
			found(BIASES, [...flat, row], 2).filter(({ reason }) => reason.rule === 'rises').length;
		expect(rises([5, 5, 5.01, 5.01, 5])).toBe(0);
		expect(rises([5, 5, 5.02, 5.02, 5])).toBe(1);
	});

	it('lets a rise within six times the repeatability pass', () => {
		// Every bias is read twice, ±0.5 % apart: s = 0.5 %·√2 of ln C, so 6 s is 4.2 %.
		const twice = (row: readonly number[]) =>
			row.flatMap((value) => [value * 1.005, value * 0.995]);
		const biases = BIASES.flatMap((bias) => [bias, bias]);
		const lot = LOT.map(twice);
		const rises = (row: readonly number[]) =>
			found(biases, [...lot, twice(row)], 3).filter(({ reason }) => reason.rule === 'rises').length;
		expect(rises([40, 30, 24, 24.9, 17])).toBe(0);
		expect(rises([40, 30, 24, 25.2, 17])).toBe(1);
	});
});

describe('repeatability', () => {
	// R: r <- list(c(38.1,38.3), c(13.7,13.75,13.72), c(5.1));
	// sqrt(sum(sapply(r, \(v) sum((log(v)-mean(log(v)))^2))) / sum(sapply(r, length)-1)), df 3
	it('pools the spread of ln C over devices and biases', () => {
		const { condition } = sweepsOf([0, 0, 4, 4, 4, 10], [[38.1, 38.3, 13.7, 13.75, 13.72, 5.1]], 2);
		const pooled = repeatability([condition], 1);
		expect(pooled?.degreesOfFreedom).toBe(3);
		expect(pooled?.standardDeviation).toBeCloseTo(0.002609548098, 12);
	});

	it('is not known when nothing was read twice', () => {
		expect(repeatability([sweepsOf([0, 4], [[38, 13]], 2).condition], 1)).toBeUndefined();
	});
});
