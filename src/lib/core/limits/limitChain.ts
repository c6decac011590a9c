import { roundOutward, type Rounded } from '../units/rounding';
import { moveOutwards, type Allowance, type Side } from './allowance';
import { withoutNoise } from './digits';
import { driftOn } from './drift';
import type { LimitPolicy } from './policy';

export interface ChainOptions {
	readonly side: Side;
	readonly rules: Pick<LimitPolicy, 'drift' | 'resolution'>;
	/** Systematic uncertainty; nothing where none is stated or added. */
	readonly uncertainty: Allowance;
	/** One unit of the table in SI. */
	readonly unitScale: number;
}

/** The numbers between the raw and the printed limit, all in the unit of the table. */
export interface LimitChain {
	readonly raw: number;
	readonly afterDrift: number;
	readonly afterUncertainty: number;
	readonly printed: Rounded;
}

/**
 * Raw limit → drift allowance outwards → systematic uncertainty outwards → rounded outwards. The
 * random error is in the spread already.
 *
 * @param raw in the unit of the table
 */
export function limitChain(
	raw: number,
	{ side, rules, uncertainty, unitScale }: ChainOptions
): LimitChain {
	const afterDrift = moveOutwards(raw, side, { by: driftOn(rules, side), unitScale });
	const afterUncertainty = moveOutwards(afterDrift, side, { by: uncertainty, unitScale });
	return {
		raw,
		afterDrift,
		afterUncertainty,
		printed: roundOutward(
			withoutNoise(afterUncertainty),
			side === 'minimum' ? 'down' : 'up',
			rules.resolution
		)
	};
}
