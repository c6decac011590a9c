import type { Database } from '../db/database';
import { findComputation } from '../db/findComputation';

/** How far the distributions of a product are: what its pages show instead of, or above, numbers. */
export interface LimitsProgress {
	readonly hasData: boolean;
	/** The open computation, if any. */
	readonly open: { readonly done: number; readonly total: number; readonly words: string } | null;
	/** Why the newest computation failed. */
	readonly error: string | null;
}

const NOT_BEGUN = { done: 0, total: 0, words: '' };

export async function limitsProgress(
	db: Database,
	product: { readonly id: number; readonly basisHash: string | null }
): Promise<LimitsProgress> {
	const newest = await findComputation(db, product.id);
	return {
		hasData: product.basisHash !== null,
		open: newest?.isOpen ? (newest.progress ?? NOT_BEGUN) : null,
		error: newest?.error ?? null
	};
}
