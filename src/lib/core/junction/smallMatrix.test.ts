import { expect, it } from 'vitest';
import { invert, solve } from './smallMatrix';

// By hand: [[4, 2], [2, 3]] x = [10, 8] has x = [1.75, 1.5]; its inverse is [[3, −2], [−2, 4]]/8
it('solves and inverts a symmetric system', () => {
	const matrix = Float64Array.of(4, 2, 0, 0, 2, 3, 0, 0);
	const right = Float64Array.of(10, 8, 0, 0);
	solve(matrix.slice(), right, 2);
	expect(right[0]).toBeCloseTo(1.75, 14);
	expect(right[1]).toBeCloseTo(1.5, 14);
	expect(invert(matrix, 2, 1e-13)).toBe(true);
	expect([matrix[0], matrix[1], matrix[4], matrix[5]].map((v) => v! * 8)).toEqual([3, -2, -2, 4]);
});

it('tells a singular matrix', () => {
	expect(invert(Float64Array.of(1, 1, 0, 0, 1, 1, 0, 0), 2, 1e-13)).toBe(false);
});
