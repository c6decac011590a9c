import { packGroups } from '$lib/core/distributions/packGroups';
import type { Distribution } from '$lib/core/distributions/summary';
import type { Connection } from '../db/database';
import { distribution } from '../db/schema';
import { write } from '../db/write';

/** Rows of one transaction: 8 take about 2 ms to write. */
const ROWS_A_WRITE = 8;

/**
 * Stores distributions of a product under the hash of their basis. Those that are there already
 * stay: the same basis gives the same numbers.
 */
export async function storeDistributions(
	db: Connection,
	owner: { readonly product: number; readonly basisHash: string },
	distributions: readonly Distribution[]
): Promise<void> {
	for (let first = 0; first < distributions.length; first += ROWS_A_WRITE) {
		const rows = distributions.slice(first, first + ROWS_A_WRITE).map((of) => {
			const { groups, extremes, ...summary } = of;
			return {
				...owner,
				characteristic: of.characteristic,
				conditionKey: of.conditionKey,
				summary,
				groups: Buffer.from(packGroups({ groups, extremes }))
			};
		});
		await write(db, (tx) => tx.insert(distribution).values(rows).onConflictDoNothing());
	}
}
