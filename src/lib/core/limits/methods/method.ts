import type { Distribution } from '../../distributions/summary';
import type { LimitPolicy } from '../policy';

export type Side = 'minimum' | 'maximum';

export interface MethodInput {
	readonly distribution: Distribution;
	readonly rules: LimitPolicy;
	/** The sides promised at once: with both, the confidence is shared. */
	readonly sides: readonly Side[];
}

/** How far the limits lie from the mean of the transformed values. */
export interface Margin {
	/** In standard deviations of the transformed values. */
	readonly factor: number;
	/** The symbol of the factor in the derivation: `k₁`. */
	readonly symbol: string;
	/** Promise, formula and source, as the derivation prints them. */
	readonly method: string;
}

export type MethodOutcome =
	| {
			readonly status: 'supported';
			/** The same on both sides: mean − factor·s and mean + factor·s. */
			readonly margin: Margin;
			readonly warnings: readonly string[];
	  }
	| { readonly status: 'refused'; readonly message: string };

/** What a method makes of a distribution; one module a method. */
export type Method = (input: MethodInput) => MethodOutcome;
