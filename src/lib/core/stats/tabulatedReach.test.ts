import { expect, it } from 'vitest';
import { lotsToleranceHalfWidth, lotsToleranceMargin } from './lotsToleranceMargin';
import { tabulatedReach } from './tabulatedReach';

const PROMISE = { content: 0.99, confidence: 0.95 };

it.each([
	[3, 25],
	[8, 10]
])('is the margin itself for %i lots of %i devices, to two parts in 10 000', (lots, size) => {
	const withinDegrees = lots * (size - 1);
	for (const reachOf of [lotsToleranceMargin, lotsToleranceHalfWidth]) {
		const reach = tabulatedReach((strata) => reachOf(strata, PROMISE), {
			lots,
			effectiveSize: size,
			withinDegrees
		});
		for (const [ofLotMeans, withinLots] of [
			[1e-5, 1],
			[0.037, 1],
			[0.2, 0.7],
			[2, 0.3],
			[40, 1]
		] as const) {
			const strata = {
				mean: 0,
				lots,
				effectiveSize: size,
				strata: [
					{ variance: ofLotMeans, degrees: lots - 1, share: 1 },
					{ variance: withinLots, degrees: withinDegrees, share: 1 - 1 / size }
				]
			};
			const ratio = reach(ofLotMeans, withinLots) / reachOf(strata, PROMISE);
			expect(Math.abs(ratio - 1)).toBeLessThan(2e-4);
		}
	}
});
