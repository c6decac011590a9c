import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sortNumbers } from './sortNumbers';

/** Told apart by their bits: −0 is not 0 here. */
function expectSorted(values: Float64Array): void {
	const bits = (sorted: Float64Array) => [...new BigInt64Array(sorted.buffer)].join();
	expect(bits(sortNumbers(values))).toBe(bits(values.slice().sort()));
}

describe('puts numbers where the sort of the language does', () => {
	it.each([0, 1, 24, 25, 500])('%i numbers of any size', (count) => {
		fc.assert(
			fc.property(
				fc.float64Array({ minLength: count, maxLength: count, noNaN: false }),
				expectSorted
			),
			{ numRuns: 20 }
		);
	});

	it('readings that spread evenly, in steps, or around zero', () => {
		const index = Array.from({ length: 2000 }, (_, i) => (i * 1231) % 2000);
		expectSorted(Float64Array.from(index, (i) => 40e-12 * Math.exp(0.01 * Math.sin(i))));
		expectSorted(Float64Array.from(index, (i) => i % 7));
		expectSorted(Float64Array.from(index, (i) => (i % 3) - 1 || (i % 2 === 0 ? -0 : 0)));
	});

	it('outliers that leave all others to one bucket', () => {
		const inStep = Array.from({ length: 300 }, (_, i) => ((i * 77) % 300) * 1e-12);
		expectSorted(Float64Array.from([...inStep, 1]));
		expectSorted(Float64Array.from([...inStep, Infinity, -Infinity]));
		expectSorted(Float64Array.from([...inStep, Number.MAX_VALUE, -Number.MAX_VALUE]));
		expectSorted(Float64Array.from(inStep, (value) => (value > 1e-10 ? 0 : 5e-324)));
		expectSorted(new Float64Array(300).fill(1 / 3));
	});

	it('numbers of which some are none', () => {
		expectSorted(Float64Array.from({ length: 60 }, (_, i) => (i % 7 === 0 ? Number.NaN : -i)));
	});
});

it('leaves the given ones alone, and nothing of a large sample in the next', () => {
	const values = Float64Array.from({ length: 400 }, (_, i) => -i);
	sortNumbers(values);
	expect(values[1]).toBe(-1);
	expectSorted(values.slice(0, 100));
});
