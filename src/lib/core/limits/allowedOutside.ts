import { incompleteBeta } from '../stats/incompleteBeta';
import type { Basis } from './basis';

/** What a limit promises, as far as the number of devices beyond it goes. */
export interface OutsidePromise {
	/** Share of devices that a limit of this content and confidence leaves outside. */
	readonly share: number;
	/** γ */
	readonly confidence: number;
}

/**
 * How many devices the basis allows beyond one limit. None behind *tested on every device*; else as
 * many as a sample with that share outside stays within with probability γ, the γ quantile of the
 * binomial distribution. `null` for a typical value, which promises nothing.
 *
 * @example allowedOutside('characterized', 300, { share: 0.03595859787, confidence: 0.95 }) // 16
 */
export function allowedOutside(
	basis: Basis,
	devices: number,
	promise: OutsidePromise
): number | null {
	switch (basis) {
		case 'tested':
			return 0;
		case 'sample-tested':
		case 'correlation':
		case 'characterized':
			return binomialQuantile(devices, promise);
		case 'typical':
			return null;
		default:
			return basis satisfies never;
	}
}

/** The fewest count that is not exceeded with the confidence: P[Bin(n, share) > count] ≤ 1 − γ. */
function binomialQuantile(devices: number, { share, confidence }: OutsidePromise): number {
	const isEnough = (count: number) =>
		count >= devices ||
		incompleteBeta(count + 1, devices - count, share, 1 - share).lower <= 1 - confidence;
	let [tooFew, enough] = [-1, devices];
	while (enough - tooFew > 1) {
		const middle = Math.floor((tooFew + enough) / 2);
		if (isEnough(middle)) enough = middle;
		else tooFew = middle;
	}
	return enough;
}
