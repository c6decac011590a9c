import type { Distribution } from '$lib/core/distributions/summary';
import type { Basis } from '$lib/core/limits/basis';
import { decideRow } from '$lib/core/limits/decision/decideRow';
import type { DecidedLimit } from '$lib/core/limits/decision/limitDecision';
import { independentLots } from '$lib/core/limits/independentLots';
import type { LimitPolicy } from '$lib/core/limits/policy';
import type { Connection } from '../db/database';
import { listOverrides } from '../db/listOverrides';
import { limitsOverview, type LimitGroup } from './limitsOverview';
import { CAPACITANCE } from './readBasis';

export interface LimitsScreen {
	readonly groups: readonly LimitGroup[];
	/** What the rows rest on, by condition. */
	readonly distributions: ReadonlyMap<string, Distribution>;
	/** What people decided in the machine's place, by condition; the rows print it already. */
	readonly decided: ReadonlyMap<string, DecidedLimit>;
	/** Names of the wafer lots behind any row. */
	readonly lots: readonly string[];
}

/**
 * Every limit of a product by one policy as it is printed, decisions included, with the stored
 * distributions it is judged by.
 */
export async function limitsScreen(
	db: Connection,
	{
		rules,
		...asked
	}: Parameters<typeof limitsOverview>[1] & {
		readonly declaredBasis: Basis;
		readonly rules: LimitPolicy;
	}
): Promise<LimitsScreen> {
	const computed = await limitsOverview(db, asked);
	const decided = await listOverrides(db, {
		product: asked.product,
		characteristic: CAPACITANCE.characteristic,
		policyVersion: asked.policyVersion,
		basis: asked.declaredBasis
	});
	const distributions = new Map(
		computed.flatMap((group) =>
			group.distributions.map(
				({ distribution }) => [distribution.conditionKey, distribution] as const
			)
		)
	);
	const groups = computed.map((group) => ({
		...group,
		rows: group.rows.map((row) => {
			const by = decided.get(row.conditionKey);
			const distribution = distributions.get(row.conditionKey);
			return by === undefined || distribution === undefined
				? row
				: decideRow({ ...row, basis: asked.declaredBasis }, by, { rules, distribution });
		})
	}));
	const lots = [...distributions.values()].flatMap((of) =>
		independentLots(of).map(({ name }) => name)
	);
	return { groups, distributions, decided, lots: [...new Set(lots)].sort() };
}
