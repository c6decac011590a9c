import { NO_ALLOWANCE, type Allowance, type Side } from './allowance';
import type { LimitPolicy } from './policy';

/** What a policy allows for drift over life on one side. */
export function driftOn({ drift }: Pick<LimitPolicy, 'drift'>, side: Side): Allowance {
	if (typeof drift === 'number') return { relative: drift };
	return drift[side] ?? NO_ALLOWANCE;
}
