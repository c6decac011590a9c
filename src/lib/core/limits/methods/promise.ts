import type { Side } from '../allowance';
import type { LimitPolicy } from '../policy';

/** What is promised of each single limit once the sides are known. */
export interface SidePromise {
	/** Whether the content lies between both limits, rather than on one side of each. */
	readonly isBetween: boolean;
	readonly content: number;
	/** γ of a single limit: shared when a minimum and a maximum are promised at once. */
	readonly confidence: number;
	/** The promise as a sentence. */
	readonly text: string;
}

/**
 * When a minimum and a maximum are promised at once, each on its own, each takes (1 + γ)/2, so that
 * both hold together with confidence γ (Bonferroni). Content between both needs no sharing. A single
 * limit is promised with the whole confidence, whatever the policy says of tails.
 */
export function promiseOf(
	{ content, confidence, tails }: LimitPolicy,
	sides: readonly Side[]
): SidePromise {
	if (sides.length < 2) {
		return {
			isBetween: false,
			content,
			confidence,
			text: `Content ${content}, each limit on its own; confidence ${confidence}.`
		};
	}
	if (tails === 'both') {
		return {
			isBetween: true,
			content,
			confidence,
			text: `Content ${content} between both limits together; confidence ${confidence}.`
		};
	}
	// Twelve digits keep (1 + 0.9)/2 from printing as 0.9499999999999999.
	const shared = Number(((1 + confidence) / 2).toPrecision(12));
	return {
		isBetween: false,
		content,
		confidence: shared,
		text: `Content ${content}, each limit on its own; confidence ${confidence} shared by min and max, so ${shared} each.`
	};
}
