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
it('reaches far enough where a single degree of freedom decides the limit', () => {
	const promise = { content: 0.99, confidence: 0.975 };
	expect(lotsToleranceMargin(strata, promise) / 0.082417974).toBeCloseTo(1, 3);
	expect(lotsToleranceHalfWidth(strata, promise) / 0.0921059).toBeCloseTo(1, 2.7);
});
