import type { Margin, MethodInput, MethodOutcome } from './method';
import { pooledMean, totalDeviation } from './moments';

/** k where a policy of this method names none. */
export const DEFAULT_K = 3;

/**
 * The house rule mean ± k·s. It promises nothing about the population, so what it gives is printed
 * only behind a test of every device.
 */
export function sigmaMethod({ distribution, rules, sides }: MethodInput): MethodOutcome {
	const factor = rules.k ?? DEFAULT_K;
	const margin: Margin = {
		kind: 'margin',
		centre: pooledMean(distribution),
		deviation: totalDeviation(distribution),
		components: [],
		factor,
		symbol: 'k',
		method: `House rule, mean ± ${factor} standard deviations. Without content and confidence: no guarantee by itself.`
	};
	return {
		status: 'supported',
		limits: Object.fromEntries(sides.map((side) => [side, margin])),
		isPooled: true,
		warnings: []
	};
}
