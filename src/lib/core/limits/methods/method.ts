import type { Distribution } from '../../distributions/summary';
import type { Side } from '../allowance';
import type { LimitPolicy } from '../policy';

export interface MethodInput {
	readonly distribution: Distribution;
	readonly rules: LimitPolicy;
	/** The sides promised at once: with both, the confidence is shared. */
	readonly sides: readonly Side[];
}

/** A number of transformed values with the words of its line in the derivation. */
export interface NamedMoment {
	readonly value: number;
	/** `Mean`: the derivation appends of what. */
	readonly name: string;
	readonly method: string;
}

/** A limit so many deviations from a centre, in transformed values: centre ∓ factor·deviation. */
export interface Margin {
	readonly kind: 'margin';
	readonly centre: NamedMoment;
	readonly deviation: NamedMoment;
	/** Further deviations that the factor rests on, as a derivation lists them. */
	readonly components: readonly NamedMoment[];
	readonly factor: number;
	/** The symbol of the factor in the derivation: `k₁`. */
	readonly symbol: string;
	/** Promise, formula and source, as the derivation prints them. */
	readonly method: string;
}

/** A limit that is the value of one measured device. */
export interface Ranked {
	readonly kind: 'ranked';
	/** SI */
	readonly value: number;
	/** From the outermost device, which is 1. */
	readonly rank: number;
	readonly method: string;
}

export type SideLimit = Margin | Ranked;

export interface Refusal {
	readonly status: 'refused';
	readonly message: string;
	/** Devices needed a side, where more devices would do. */
	readonly requiredSampleSize?: number;
}

export type MethodOutcome =
	| {
			readonly status: 'supported';
			readonly limits: Readonly<Partial<Record<Side, SideLimit>>>;
			/** Whether the devices of all lots are taken for one population. */
			readonly isPooled: boolean;
			readonly warnings: readonly string[];
	  }
	| Refusal;

/** What a method makes of a distribution; one module a method. */
export type Method = (input: MethodInput) => MethodOutcome;
