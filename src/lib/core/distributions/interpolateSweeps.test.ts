import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { biasesBetween, denseBand } from './biasesBetween';
import type { SweepMatrix } from './conditionColumns';
import { InterpolationError } from './errors';
import { interpolateSweeps } from './interpolateSweeps';
import { straighteningPotential } from './straighteningPotential';

const matrixOf = (grid: readonly number[], ...rows: number[][]): SweepMatrix => ({
	set: 3,
	firstRow: 2048,
	grid,
	unitScale: 1e-12,
	values: Float64Array.from(rows.flat())
});

/** A power law, C in pF. */
const law =
	(c0: number, junctionPotential: number, exponent: number) =>
	(bias: number): number =>
		c0 * (1 + bias / junctionPotential) ** -exponent;

describe('between the readings of a sweep', () => {
	const grid = [0, 1, 3, 10, 30];
	const wanted = [0.4, 1, 2, 7.5, 29];

	it('is exact for a power law with this junction potential', () => {
		const curves = [law(20, 0.7, 0.5), law(90, 0.7, 1.6)];
		const rows = curves.map((curve) => grid.map(curve));
		const found = interpolateSweeps(matrixOf(grid, ...rows), wanted, 0.7);
		expect(found).toMatchObject({ set: 3, firstRow: 2048, grid: wanted, unitScale: 1e-12 });
		const exact = curves.flatMap((curve) => wanted.map(curve));
		for (const [i, value] of exact.entries()) expect(found.values[i]! / value).toBeCloseTo(1, 12);
	});

	// By hand: ln C falls by half of its step where ln(V + 1) has risen by half of its own.
	it('is the geometric mean of two readings halfway between them', () => {
		const halfway = Math.sqrt(2 * 5) - 1;
		const found = interpolateSweeps(matrixOf([1, 4], [16, 4]), [halfway], 1);
		expect(found.values[0]).toBeCloseTo(8, 12);
	});

	// By hand, the figure that straighteningPotential states: 0.4 % at 0.25 V.
	it('costs 0.4 % when 0.8 V is taken for 0.6 V in the middle of a step from 0 V to 0.5 V', () => {
		const curve = law(1, 0.6, 0.5);
		const found = interpolateSweeps(matrixOf([0, 0.5], [0, 0.5].map(curve)), [0.25], 0.8);
		expect(100 * Math.abs(found.values[0]! / curve(0.25) - 1)).toBeCloseTo(0.4, 1);
	});

	it('has no value beyond the readings of a sweep, whatever others reach', () => {
		const found = interpolateSweeps(
			matrixOf([0, 1, 5, 10], [9, 7, 5, 4], [NaN, 7, 5, NaN], [NaN, NaN, NaN, NaN]),
			[0.5, 3, 5, 8],
			0.8
		);
		const has = [...found.values].map((value) => !Number.isNaN(value));
		expect(has.slice(0, 4)).toEqual([true, true, true, true]);
		expect(has.slice(4, 8)).toEqual([false, true, true, false]);
		expect(has.slice(8)).toEqual([false, false, false, false]);
		expect(found.values[6]).toBe(5);
	});

	it('bridges a reading that is missing with the next ones of the same sweep', () => {
		const curve = law(20, 0.8, 0.5);
		const row = [0, 1, 3, 10].map(curve);
		row[1] = NaN;
		const found = interpolateSweeps(matrixOf([0, 1, 3, 10], row), [1, 2], 0.8);
		expect(found.values[0]).toBeCloseTo(curve(1), 12);
		expect(found.values[1]).toBeCloseTo(curve(2), 12);
	});

	it('averages repeats, and takes sweeps in any direction', () => {
		const up = interpolateSweeps(matrixOf([0, 2, 2, 2, 8], [10, 5, 6, 7, 3]), [1, 2, 4], 0.8);
		const down = interpolateSweeps(matrixOf([8, 2, 2, 2, 0], [3, 7, 5, 6, 10]), [1, 2, 4], 0.8);
		expect(up.values[1]).toBeCloseTo(6, 14);
		for (const i of [0, 1, 2]) expect(down.values[i]).toBeCloseTo(up.values[i]!, 14);
	});

	it('lies between its two readings, and scales with them', () => {
		const reading = fc.double({ min: 0.1, max: 1000, noNaN: true });
		fc.assert(
			fc.property(
				reading,
				reading,
				fc.double({ min: 0.1, max: 5, noNaN: true }),
				(left, right, scale) => {
					const once = interpolateSweeps(matrixOf([1, 4], [left, right]), [2.5], 0.8).values[0]!;
					expect(once).toBeGreaterThanOrEqual(Math.min(left, right) * (1 - 1e-12));
					expect(once).toBeLessThanOrEqual(Math.max(left, right) * (1 + 1e-12));
					const scaled = interpolateSweeps(
						matrixOf([1, 4], [left * scale, right * scale]),
						[2.5],
						0.8
					).values[0]!;
					expect(scaled / (once * scale)).toBeCloseTo(1, 12);
				}
			),
			{ numRuns: 200 }
		);
	});

	it('refuses a junction potential that a forward bias reaches', () => {
		expect(() => interpolateSweeps(matrixOf([-0.9, 1], [9, 7]), [0], 0.8)).toThrow(
			new InterpolationError(0.8, -0.9)
		);
	});
});

describe('the potential that straightens a curve', () => {
	const grid = [0, 0.5, 1, 2, 4, 8, 15, 28];

	it.each([
		[0.65, 0.5],
		[0.93, 0.47],
		[4.2, 1.8]
	])('is that of its own power law: %f V with M = %f', (potential, exponent) => {
		const curve = law(15e-12, potential, exponent);
		expect(straighteningPotential(grid, grid.map(curve))).toBeCloseTo(potential, 2);
	});

	it('is 0.8 V for a flat curve, for three biases, and for readings that are none', () => {
		expect(
			straighteningPotential(
				grid,
				grid.map(() => 3e-13)
			)
		).toBe(0.8);
		expect(straighteningPotential([0, 1, 2], [3, 2, 1])).toBe(0.8);
		expect(straighteningPotential([0, 1, 2, 3], [3, 2, 1, 0])).toBe(0.8);
	});

	it('stays above a deep forward bias', () => {
		expect(straighteningPotential([-1, 0, 2], [4, 3, 2])).toBe(1.25);
	});
});

it('asks only for biases inside the measured range that were not measured, each once', () => {
	expect(biasesBetween([0, 1, 4, 10], [2.5, 4, 0.5, -1, 11, 10, 2.5])).toEqual([0.5, 2.5]);
});

describe('a dense band', () => {
	it('is evenly spaced on a log axis from the lowest positive bias to the highest', () => {
		// By hand: three points between 1 and 16 on a log axis are 2, 4 and 8.
		expect(denseBand([-0.2, 0, 1, 3, 16], 3)).toEqual([2, 4, 8]);
		expect(denseBand([0, 1, 2, 16], 3)).toEqual([4, 8]);
	});

	it('has at most forty points, all inside', () => {
		const band = denseBand([0, 0.1, 0.5, 1, 2, 5, 10, 28]);
		expect(band.length).toBeLessThanOrEqual(40);
		expect(band.length).toBeGreaterThan(35);
		expect(Math.min(...band)).toBeGreaterThan(0.1);
		expect(Math.max(...band)).toBeLessThan(28);
	});

	it('is empty for a single bias', () => {
		expect(denseBand([0, 5])).toEqual([]);
		expect(denseBand([-1, 0])).toEqual([]);
	});
});
