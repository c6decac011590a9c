import { expect, it } from 'vitest';
import { medianOf, robustSpread } from './robustSpread';

// R: x <- c(1.2, 3.4, 2.2, 9.9, 4.1, 0.3); median(x); mad(x). R's constant is 1.4826, ours has all
// its digits (1/qnorm(3/4)), so they agree to the fifth figure.
it('matches the median and mad of R', () => {
	const { median, scale } = robustSpread(Float64Array.of(1.2, 3.4, 2.2, 9.9, 4.1, 0.3));
	expect(median).toBeCloseTo(2.8, 12);
	expect(scale / 2.14977).toBeCloseTo(1, 5);
	expect(scale / 2.14977).toBeCloseTo(1.482602218505602 / 1.4826, 12);
});

it('is 0 when more than half of the values are the same', () => {
	expect(robustSpread(Float64Array.of(5, 5, 5, 5, 9))).toEqual({ median: 5, scale: 0 });
});

it('leaves its input as it was', () => {
	const values = Float64Array.of(3, 1, 2);
	expect(medianOf(values)).toBe(2);
	expect(values).toEqual(Float64Array.of(3, 1, 2));
});

it('has no middle of nothing', () => {
	expect(medianOf(new Float64Array(0))).toBeNaN();
});
