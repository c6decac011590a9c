import { expect, it } from 'vitest';
import { binomialQuantile } from './binomialQuantile';

// R: qbinom(probability, trials, share)
it.each([
	[0.95, 300, 0.05, 21],
	[0.95, 297, 0.01, 6],
	[0.975, 300, 0.01, 7],
	[0.95, 417, 0.05, 28],
	[0.95, 33_000, 0.05, 1715],
	[0.95, 10, 0.005, 0],
	[0.95, 1, 0.5, 1]
])('the %f point of %i trials with a share of %f', (probability, trials, share, count) => {
	expect(binomialQuantile(probability, trials, share)).toBe(count);
});

it('is 0 or all of them where the share is', () => {
	expect(binomialQuantile(0.95, 12, 0)).toBe(0);
	expect(binomialQuantile(0.95, 12, 1)).toBe(12);
});
