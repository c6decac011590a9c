import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import { roundOutward, type Rounded } from '../units/rounding';
import { withoutNoise } from './digits';
import type { Side } from './methods/method';
import type { LimitPolicy } from './policy';

export interface ChainInput {
	readonly distribution: Pick<Distribution, 'transform' | 'mean' | 'standardDeviation'>;
	readonly factor: number;
	readonly side: Side;
	readonly rules: Pick<LimitPolicy, 'drift' | 'resolution'>;
	/** Relative systematic uncertainty; 0 where none is stated. */
	readonly uncertainty: number;
	/** One unit of the table in SI. */
	readonly unitScale: number;
}

/** The numbers between the distribution and the printed limit, all in the unit of the table. */
export interface LimitChain {
	readonly raw: number;
	readonly afterDrift: number;
	readonly afterUncertainty: number;
	readonly printed: Rounded;
}

/**
 * Raw limit → drift allowance outwards → systematic uncertainty outwards → rounded outwards. Each
 * allowance is relative and multiplies; the random error is in the spread already.
 */
export function limitChain(input: ChainInput): LimitChain {
	const { distribution, factor, side, unitScale } = input;
	const sign = side === 'minimum' ? -1 : 1;
	const transformed = distribution.mean + sign * factor * distribution.standardDeviation;
	const raw = withoutNoise(TRANSFORMS[distribution.transform].invert(transformed) / unitScale);
	return { raw, ...outwards(raw, input) };
}

/** The part of the chain after the raw limit. */
export function outwards(
	raw: number,
	{ side, rules, uncertainty }: Pick<ChainInput, 'side' | 'rules' | 'uncertainty'>
): Omit<LimitChain, 'raw'> {
	const sign = side === 'minimum' ? -1 : 1;
	const afterDrift = raw + sign * Math.abs(raw) * rules.drift;
	const afterUncertainty = afterDrift + sign * Math.abs(afterDrift) * uncertainty;
	return {
		afterDrift,
		afterUncertainty,
		printed: roundOutward(
			withoutNoise(afterUncertainty),
			side === 'minimum' ? 'down' : 'up',
			rules.resolution
		)
	};
}
