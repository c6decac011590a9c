import { expect, it } from 'vitest';
import { linearAxis } from './linearAxis';

it.each([
	[0, 187, [0, 50, 100, 150, 200], 0],
	[0.0011, 0.238, [0, 0.05, 0.1, 0.15, 0.2, 0.25], 2],
	[-25, 125, [-25, 0, 25, 50, 75, 100, 125], 0],
	[0, 1.4, [0, 0.25, 0.5, 0.75, 1, 1.25, 1.5], 2],
	[100, 101, [100, 100.2, 100.4, 100.6, 100.8, 101], 1],
	[7, 7, [6, 8, 10, 12, 14], 0]
])('covers %d to %d by ticks without the noise of binary sums', (low, high, ticks, decimals) => {
	expect(linearAxis(low, high)).toEqual({
		domain: [ticks[0], ticks.at(-1)],
		ticks,
		decimals
	});
});
