import { productNotFound } from '$lib/core/messages/review';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import type { Stores } from '../work/stores';
import { freezeRevision, type SubmitOutcome } from './freezeRevision';
import { resolveDraft } from './resolveDraft';

/** Submits a product's draft for verification as it stands now; refused with every reason at once. */
export async function submitRevision(
	{ db }: Pick<Stores, 'db'>,
	{ partNumber, by }: { readonly partNumber: string; readonly by: string }
): Promise<SubmitOutcome> {
	const product = await findProductByPartNumber(db, partNumber);
	if (product === undefined) return { status: 'refused', problems: [productNotFound(partNumber)] };
	const resolved = await resolveDraft(db, product.id);
	return freezeRevision({ db }, { product, resolved, by });
}
