import type { MethodInput, MethodOutcome } from './method';

/** k where a policy of this method names none. */
export const DEFAULT_K = 3;

/**
 * The house rule mean ± k·s. It promises nothing about the population, so what it gives is printed
 * only behind a test of every device.
 */
export function sigmaMethod({ rules }: MethodInput): MethodOutcome {
	const factor = rules.k ?? DEFAULT_K;
	return {
		status: 'supported',
		margin: {
			factor,
			symbol: 'k',
			method: `House rule, mean ± ${factor} standard deviations. Without content and confidence: no guarantee by itself.`
		},
		warnings: []
	};
}
