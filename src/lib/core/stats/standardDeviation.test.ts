import { expect, it } from 'vitest';
import { SampleTooSmallError } from './errors';
import { standardDeviation, sumOfSquares } from './standardDeviation';

// R 4.2.2: sd(c(0.512, 0.498, 0.507, 0.515, 0.503))
it('matches R', () => {
	expect(standardDeviation([0.512, 0.498, 0.507, 0.515, 0.503])).toBeCloseTo(
		0.006819090848492934,
		16
	);
});

it('does not lose a small spread on a large mean', () => {
	expect(standardDeviation([1e9 + 4, 1e9 + 7, 1e9 + 13, 1e9 + 16])).toBeCloseTo(Math.sqrt(30), 12);
});

it('is zero without spread, and refused for one device', () => {
	expect(sumOfSquares([2, 2, 2])).toBe(0);
	expect(() => standardDeviation([1])).toThrow(SampleTooSmallError);
});
