import type { WhatIfCondition } from '$lib/components/limits/whatIfForm';
import type { Basis } from '$lib/core/limits/basis';
import { readWhatIf, type WhatIfField } from '$lib/core/limits/whatIf/readWhatIf';
import type { WhatIfAnswer } from '$lib/core/limits/whatIf/whatIfAnswer';
import type { Connection } from '$lib/server/db/database';
import { whatIf } from '$lib/server/services/whatIf';

/** What the page's address asks of a trial, and what comes of it; both `null` where it asks none. */
export interface Trial {
	readonly answer: WhatIfAnswer | null;
	readonly refusal: { readonly field: WhatIfField | null; readonly message: string } | null;
}

export async function trialOf(
	db: Connection,
	search: URLSearchParams,
	of: {
		readonly product: { readonly id: number; readonly basisHash: string | null };
		readonly policy: number;
		readonly basis: Basis;
		/** The condition asked about. */
		readonly at: WhatIfCondition | undefined;
	}
): Promise<Trial> {
	if (!search.has('whatif') || of.at === undefined) return { answer: null, refusal: null };
	const read = readWhatIf(search);
	if (read.status === 'refused') {
		return { answer: null, refusal: { field: read.field, message: read.message } };
	}
	const outcome = await whatIf(db, of.product, {
		policy: of.policy,
		basis: of.basis,
		temperatureCelsius: of.at.temperatureCelsius,
		...(of.at.frequency === null ? {} : { frequency: of.at.frequency }),
		at: of.at.key,
		change: read.change
	});
	return outcome.status === 'answered'
		? { answer: outcome.answer, refusal: null }
		: { answer: null, refusal: { field: null, message: outcome.message } };
}
