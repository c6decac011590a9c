import { expect, it } from 'vitest';
import { coveringHalfWidth } from './coveringHalfWidth';

// SciPy 1.17.1: sqrt(stats.ncx2.ppf(content, 1, offset**2)); on centre the normal quantile
it.each([
	[0, 0.95, 1.959963984540054],
	[0.5, 0.99, 2.842229624818631],
	[-2, 0.9, 3.28155193048879],
	[5, 0.95, 6.644853626951469]
])('at offset %f holds %f within what SciPy says', (offset, content, halfWidth) => {
	expect(coveringHalfWidth(offset, content)).toBeCloseTo(halfWidth, 10);
});
