import { expect, it } from 'vitest';
import { NoSolutionError } from './errors';
import { solveNear } from './solveNear';

it('needs few evaluations when the likeness is close', () => {
	let calls = 0;
	const excess = (x: number) => {
		calls++;
		return x * x * x - 2;
	};
	expect(solveNear(excess, (x) => x * x * x - 2.001, 1, 1)).toBeCloseTo(Math.cbrt(2), 12);
	expect(calls).toBeLessThanOrEqual(4);
});

it('finds the zero when the likeness is far off or flat', () => {
	expect(solveNear(Math.log, (x) => Math.tanh(x - 1.3), 1, 0.2)).toBeCloseTo(1, 9);
	expect(
		solveNear(
			(x) => x - 500,
			(x) => x - 1,
			3,
			1
		)
	).toBeCloseTo(500, 6);
});

it('says so when there is none', () => {
	expect(() =>
		solveNear(
			() => -1,
			(x) => x - 1,
			1,
			1
		)
	).toThrow(NoSolutionError);
});
