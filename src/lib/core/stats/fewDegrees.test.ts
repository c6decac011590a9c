import { expect, it } from 'vitest';
import { lotsToleranceHalfWidth, lotsToleranceMargin } from './lotsToleranceMargin';
import type { LotStrata } from './lotStrata';

const strata: LotStrata = {
	mean: 0,
	lots: 3,
	effectiveSize: 2,
	strata: [
		{ variance: 1.125e-6, degrees: 2, share: 1 },
		{ variance: 6.75e-6, degrees: 1, share: 1 / 6 },
		{ variance: 6.75e-6, degrees: 4, share: 0.5 }
	]
};

// SciPy 1.10.1: the triple integral over 600 · 300 nodes of ln χ² (201 of Z) with chi2.sf innermost,
// solved by brentq: 0.0824180 and 0.0921059
/** So far out 0.5 % of a margin is 4 parts in 10⁵ of the confidence: F(0.0807) is 0.97486 there. */
const OF_MARGIN = 0.005;

it('reaches far enough where a single degree of freedom decides the limit', () => {
	const promise = { content: 0.99, confidence: 0.975 };
	const margin = lotsToleranceMargin(strata, promise);
	const halfWidth = lotsToleranceHalfWidth(strata, promise);
	expect(Math.abs(margin / 0.082417974 - 1)).toBeLessThan(OF_MARGIN);
	expect(Math.abs(halfWidth / 0.0921059 - 1)).toBeLessThan(OF_MARGIN);
});
