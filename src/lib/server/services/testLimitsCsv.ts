import { csvText } from '$lib/core/csvText';
import { TEST_TABLE_HEAD, testTable } from '$lib/core/limits/testTable';
import type { Connection } from '../db/database';
import { limitsChoice } from './limitsChoice';
import { limitsScreen } from './limitsScreen';

/** The test limits of a product by the policy and basis of an address, as CSV; a head alone without any. */
export async function testLimitsCsv(
	db: Connection,
	product: { readonly id: number; readonly basisHash: string | null },
	search: URLSearchParams
): Promise<string> {
	const { policy, basis } = await limitsChoice(db, search);
	if (product.basisHash === null || policy === undefined) return csvText([[...TEST_TABLE_HEAD]]);
	const { groups, distributions, decided } = await limitsScreen(db, {
		product: product.id,
		basisHash: product.basisHash,
		policyVersion: policy.id,
		declaredBasis: basis,
		rules: policy.rules
	});
	const rows = groups.flatMap((group) =>
		group.rows.flatMap((row) => {
			const distribution = distributions.get(row.conditionKey);
			return distribution === undefined
				? []
				: [{ row, distribution, decided: decided.get(row.conditionKey) }];
		})
	);
	return csvText([[...TEST_TABLE_HEAD], ...testTable(rows, policy)]);
}
