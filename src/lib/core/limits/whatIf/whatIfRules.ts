import type { Side } from '../allowance';
import type { Basis } from '../basis';
import type { LimitPolicy } from '../policy';
import type { PromisedSides, WhatIfChange } from './whatIfRequest';

export interface WhatIfRules {
	readonly rules: LimitPolicy;
	readonly sides: readonly Side[];
	readonly declaredBasis: Basis;
}

/**
 * A policy with the changes somebody tries. Each bias is promised on its own, whatever the policy
 * says: the factor of a whole curve is simulated, which takes longer than a question may.
 */
export function whatIfRules(
	stored: LimitPolicy,
	storedBasis: Basis,
	{ basis, sides = 'minimum-and-maximum', lots: _, ...change }: WhatIfChange
): WhatIfRules {
	return {
		rules: { ...stored, ...defined(change), span: 'each-bias' },
		sides: sidesOf(sides),
		declaredBasis: basis ?? storedBasis
	};
}

export function sidesOf(sides: PromisedSides): readonly Side[] {
	return sides === 'minimum-and-maximum' ? ['minimum', 'maximum'] : [sides];
}

type Given = Omit<WhatIfChange, 'basis' | 'sides' | 'lots'>;
type Defined = { [Key in keyof Given]?: Exclude<Given[Key], undefined> };

function defined({ content, confidence, method, tails, drift, guardBand }: Given): Defined {
	return {
		...(content === undefined ? {} : { content }),
		...(confidence === undefined ? {} : { confidence }),
		...(method === undefined ? {} : { method }),
		...(tails === undefined ? {} : { tails }),
		...(drift === undefined ? {} : { drift }),
		...(guardBand === undefined ? {} : { guardBand })
	};
}
