import type { Distribution } from '../distributions/summary';
import { NO_ALLOWANCE, type Allowance } from './allowance';
import type { LimitPolicy } from './policy';

export interface UncertaintyUsed {
	/** What the sets state; `null` where none states one. */
	readonly stated: Allowance | null;
	/** What of it moves a limit outwards. */
	readonly added: Allowance;
}

/** The systematic uncertainty behind a distribution, and what a policy makes of it. */
export function statedUncertainty(
	{ uncertainty }: Pick<Distribution, 'uncertainty'>,
	{ uncertaintyTreatment }: Pick<LimitPolicy, 'uncertaintyTreatment'>,
	given?: Allowance
): UncertaintyUsed {
	const stated = given ?? (uncertainty === null ? null : { relative: uncertainty });
	switch (uncertaintyTreatment) {
		case 'outwards':
			return { stated, added: stated ?? NO_ALLOWANCE };
		case 'not-added':
			return { stated, added: NO_ALLOWANCE };
		default:
			return uncertaintyTreatment satisfies never;
	}
}
