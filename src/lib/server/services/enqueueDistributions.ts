import type { Database } from '../db/database';
import { enqueue } from '../work/enqueue';
import { readBasis } from './readBasis';

/**
 * Has the distributions of a product computed from its sets and verdicts as they stand in this
 * transaction. The key names that basis: a job that is at work on an earlier one must not stand for
 * this one, since it may have looked at its inputs for the last time.
 */
export async function enqueueDistributions(
	tx: Database,
	product: number,
	by: string | null
): Promise<number> {
	const basis = await readBasis(tx, product);
	return enqueue(tx, {
		kind: 'compute-distributions',
		payload: { product },
		dedupeKey: `compute-distributions:${product}:${basis?.hash ?? 'none'}`,
		by
	});
}
