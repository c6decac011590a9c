import { resolve } from '$lib/core/datasheet/resolve';
import type { Resolved } from '$lib/core/datasheet/resolveInput';
import type { Connection } from '../db/database';
import type { FoundDraft } from '../db/findDraft';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import { gatherDraft } from './gatherDraft';

type FoundProduct = NonNullable<Awaited<ReturnType<typeof findProductByPartNumber>>>;

export type DraftView =
	| { readonly status: 'unknown' }
	| { readonly status: 'none'; readonly product: FoundProduct }
	| {
			readonly status: 'open';
			readonly product: FoundProduct;
			readonly draft: FoundDraft;
			readonly resolved: Resolved;
	  };

/** A product's draft with the datasheet it makes right now. */
export async function viewDraft(db: Connection, partNumber: string): Promise<DraftView> {
	const product = await findProductByPartNumber(db, partNumber);
	if (product === undefined) return { status: 'unknown' };
	const gathered = await gatherDraft(db, product);
	if (gathered === undefined) return { status: 'none', product };
	return { status: 'open', product, draft: gathered.draft, resolved: resolve(gathered.input) };
}
