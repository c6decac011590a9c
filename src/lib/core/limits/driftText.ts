import { isNothing, NO_ALLOWANCE, type Allowance } from './allowance';
import { percent } from './digits';
import type { Drift } from './policy';

/** A policy's drift allowance in words: `0.5 %`, `min 0.5 %, max 0.1 in SI`, or `none`. */
export function driftText(drift: Drift): string {
	if (typeof drift === 'number') return drift === 0 ? 'none' : percent(drift);
	const { minimum = NO_ALLOWANCE, maximum = NO_ALLOWANCE } = drift;
	if (isNothing(minimum) && isNothing(maximum)) return 'none';
	return `min ${amount(minimum)}, max ${amount(maximum)}`;
}

/** A policy knows no unit, so that an amount stands in SI. */
function amount(by: Allowance): string {
	return 'relative' in by ? percent(by.relative) : `${by.absolute} in SI`;
}
