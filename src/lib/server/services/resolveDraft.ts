import { eq } from 'drizzle-orm';
import { draftMessages } from '$lib/core/messages/datasheet';
import { RefusalError } from '$lib/core/errors';
import { resolve } from '$lib/core/datasheet/resolve';
import type { Resolved } from '$lib/core/datasheet/resolveInput';
import type { Connection } from '../db/database';
import { product } from '../db/schema';
import { gatherDraft } from './gatherDraft';

/**
 * The datasheet a product's draft makes right now. Computes limits that weren't computed before and
 * keeps them, so call it outside of `write`.
 *
 * @throws {RefusalError} when the product has no draft
 */
export async function resolveDraft(db: Connection, productId: number): Promise<Resolved> {
	const [owner] = await db.select().from(product).where(eq(product.id, productId)).limit(1);
	const gathered = owner === undefined ? undefined : await gatherDraft(db, owner);
	if (gathered === undefined)
		throw new RefusalError(draftMessages.noDraft(owner?.partNumber ?? 'The product'));
	return resolve(gathered.input);
}
