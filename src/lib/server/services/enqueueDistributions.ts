import type { Database } from '../db/database';
import { enqueue } from '../work/enqueue';

/** Has the distributions of a product computed from its sets and verdicts as they stand then. */
export function enqueueDistributions(
	tx: Database,
	product: number,
	by: string | null
): Promise<number> {
	return enqueue(tx, {
		kind: 'compute-distributions',
		payload: { product },
		dedupeKey: `compute-distributions:${product}`,
		by
	});
}
