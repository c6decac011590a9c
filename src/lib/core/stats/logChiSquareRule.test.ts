import { expect, it } from 'vitest';
import { logChiSquareRule } from './logChiSquareRule';

// Moments of chi-square: 1, ν and, for ν > 2, E(1/U) = 1/(ν − 2)
it.each([2, 3, 9, 72, 4000])('has the moments of chi-square with %i degrees', (degrees) => {
	const { nodes, weights } = logChiSquareRule(degrees, 0.3);
	const moment = (f: (u: number) => number) =>
		nodes.reduce((sum, u, i) => sum + f(u) * weights[i]!, 0);
	expect(moment(() => 1)).toBeCloseTo(1, 9);
	expect(moment((u) => u / degrees)).toBeCloseTo(1, 8);
	expect(moment((u) => Math.exp(-u / degrees))).toBeCloseTo((1 + 2 / degrees) ** (-degrees / 2), 8);
});
