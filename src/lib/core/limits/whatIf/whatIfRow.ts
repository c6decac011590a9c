import type { Condition } from '../../characteristics/condition';
import type { Distribution } from '../../distributions/summary';
import { limitsScreenMessages } from '../../messages/limitsScreen';
import { computeLimitRow } from '../computeLimitRow';
import type { LimitRow } from '../limit';
import { selectLots } from '../selectLots';
import type { WhatIfRules } from './whatIfRules';

export interface WhatIfRowOptions {
	readonly condition: Condition;
	readonly policyVersion: number;
	readonly unit: string;
	readonly unitScale: number;
	/** Names of the wafer lots that stay in; all of them, unless given. */
	readonly lots?: readonly string[] | undefined;
}

export type WhatIfRow =
	| { readonly status: 'computed'; readonly row: LimitRow; readonly distribution: Distribution }
	| { readonly status: 'refused'; readonly message: string };

/** The limits of a stored distribution, or of some of its lots, by rules that aren't stored. */
export function whatIfRow(
	stored: Distribution,
	{ rules, sides, declaredBasis }: WhatIfRules,
	{ lots, ...options }: WhatIfRowOptions
): WhatIfRow {
	const distribution =
		lots === undefined ? stored : selectLots(stored, (name) => lots.includes(name));
	if (distribution === undefined) {
		const message =
			stored.censoring === undefined
				? limitsScreenMessages.noLotLeft()
				: limitsScreenMessages.lotsOfCensored();
		return { status: 'refused', message };
	}
	const row = computeLimitRow(distribution, rules, {
		...options,
		// Nothing is kept under it: a what-if leaves no trace.
		inputHash: '',
		sides,
		declaredBasis,
		allowsHouseRule: true
	});
	return { status: 'computed', row, distribution };
}
