import { expect, it } from 'vitest';
import { NoSolutionError } from './errors';
import { bracketIncreasing, findRoot } from './findRoot';

it('finds √2, a root at an end and a hard cubic', () => {
	expect(findRoot((x) => x * x - 2, 0, 2)).toBeCloseTo(Math.SQRT2, 15);
	expect(findRoot((x) => x - 1, 1, 2)).toBe(1);
	expect(findRoot((x) => (x - 1) ** 3, -4, 4.5, 1e-15)).toBeCloseTo(1, 4);
	expect(findRoot((x) => Math.exp(x) - 1e-3, -50, 50)).toBeCloseTo(Math.log(1e-3), 13);
});

it('refuses a bracket without a change of sign', () => {
	expect(() => findRoot((x) => x * x + 1, -1, 1)).toThrow(NoSolutionError);
});

it('brackets on either side of the guess', () => {
	const [lower, upper] = bracketIncreasing((x) => x - 100, 0, 1);
	expect(lower).toBeLessThanOrEqual(100);
	expect(upper).toBeGreaterThanOrEqual(100);
	const [low, high] = bracketIncreasing((x) => x + 100, 0, 1);
	expect(low).toBeLessThanOrEqual(-100);
	expect(high).toBeGreaterThanOrEqual(-100);
	expect(() => bracketIncreasing(() => 1, 0, 1)).toThrow(NoSolutionError);
});
