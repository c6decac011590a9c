import { expect, it } from 'vitest';
import { choleskyRoot, rowSquare } from './choleskyRoot';

// By hand: [[4, 2], [2, 5]] = [[2, 0], [1, 2]] · its transpose
it('is the triangle whose square is the matrix', () => {
	const root = choleskyRoot(Float64Array.of(4, 2, 2, 5), 2);
	expect([...root]).toEqual([2, 0, 1, 2]);
	expect(rowSquare(root, 1, 2)).toBe(5);
});

it('keeps a direction without variance at zero', () => {
	expect([...choleskyRoot(Float64Array.of(1, 1, 1, 1), 2)]).toEqual([1, 0, 1, 0]);
	expect([...choleskyRoot(Float64Array.of(-0.1, 0.2, 0.2, 1), 2)]).toEqual([0, 0, 0, 1]);
});
