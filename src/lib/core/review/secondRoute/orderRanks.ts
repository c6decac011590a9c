import { binomialQuantile } from './binomialQuantile';
import type { Assurance } from './oneSidedFactor';

/** Ranks from outside, the outermost device being 1. */
export interface Ranks {
	readonly minimum: number;
	readonly maximum: number;
}

/**
 * The devices that are limits by order statistics, by summing the binomial distribution of devices
 * beyond the content. Content between both shares what may lie outside between the ends, the odd
 * one above.
 *
 * @returns `undefined` where even the outermost devices aren't sure enough
 */
export function orderRanks(
	devices: number,
	{ content, confidence }: Assurance,
	isTogether: boolean
): Ranks | undefined {
	const beyond = binomialQuantile(1 - confidence, devices, 1 - content);
	if (beyond < (isTogether ? 2 : 1)) return undefined;
	if (!isTogether) return { minimum: beyond, maximum: beyond };
	const below = Math.floor(beyond / 2);
	return { minimum: below, maximum: beyond - below };
}
