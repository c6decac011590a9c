import type { LimitPolicy } from '../../limits/policy';
import { normalProbability } from './normalProbability';
import { oneSidedFactor } from './oneSidedFactor';

export interface Recomputed {
	/** Before rounding, in SI. */
	readonly minimum: number;
	readonly typical: number;
	readonly maximum: number;
	/** Share of normal values such a limit leaves outside on one side. */
	readonly shareOutside: number;
	/** The multiple of the spread between mean and limit. */
	readonly factor: number;
}

export type Recomputation =
	| { readonly status: 'done'; readonly limits: Recomputed }
	| { readonly status: 'refused'; readonly reason: string };

export interface RecomputeOptions {
	/** Whether minimum and maximum are promised at once and share what may go wrong. */
	readonly isShared: boolean;
	/** Stated systematic uncertainty, relative, outwards on both sides. */
	readonly uncertainty: number;
}

/**
 * Minimum, median and maximum from the devices' values by the second route: two passes over the
 * logarithms for mean and spread, the factor by integrating the confidence, the median by sorting.
 *
 * @param values in SI, positive
 */
export function recompute(
	values: readonly number[],
	rules: LimitPolicy,
	{ isShared, uncertainty }: RecomputeOptions
): Recomputation {
	if (values.length < 2)
		return { status: 'refused', reason: `only ${values.length} measured devices` };
	const factor = factorOf(values.length, rules, isShared);
	if (typeof factor === 'string') return { status: 'refused', reason: factor };

	const logs = values.map((value) => Math.log(value));
	const mean = logs.reduce((sum, y) => sum + y, 0) / logs.length;
	const squares = logs.reduce((sum, y) => sum + (y - mean) ** 2, 0);
	const spread = Math.sqrt(squares / (logs.length - 1));
	const outwards = (1 + rules.drift) * (1 + uncertainty);
	const inwards = (1 - rules.drift) * (1 - uncertainty);
	return {
		status: 'done',
		limits: {
			minimum: Math.exp(mean - factor * spread) * inwards,
			typical: median(values),
			maximum: Math.exp(mean + factor * spread) * outwards,
			shareOutside: normalProbability(-factor),
			factor
		}
	};
}

/** The multiple of the spread, or why this route has none. */
function factorOf(sampleSize: number, rules: LimitPolicy, isShared: boolean): number | string {
	switch (rules.method) {
		case 'normal':
			if (rules.tails === 'both') return 'limits for both tails together have no second route yet';
			return oneSidedFactor(sampleSize, {
				content: rules.content,
				confidence: isShared ? (1 + rules.confidence) / 2 : rules.confidence
			});
		case 'sigma':
			return rules.k ?? 'the policy states no multiple of the standard deviation';
		case 'lots':
		case 'order':
			return `the method “${rules.method}” has no second route yet`;
		default:
			return rules.method satisfies never;
	}
}

function median(values: readonly number[]): number {
	const sorted = values.toSorted((a, b) => a - b);
	const half = sorted.length >> 1;
	const [below = NaN, above = NaN] = [sorted[half - 1], sorted[half]];
	return sorted.length % 2 === 1 ? above : (below + above) / 2;
}
