import type { Distribution } from '$lib/core/distributions/summary';
import { independentLots } from '$lib/core/limits/independentLots';
import type { Connection } from '../db/database';
import { limitsOverview, type LimitGroup } from './limitsOverview';

export interface LimitsScreen {
	readonly groups: readonly LimitGroup[];
	/** What the rows rest on, by condition. */
	readonly distributions: ReadonlyMap<string, Distribution>;
	/** Names of the wafer lots behind any row. */
	readonly lots: readonly string[];
}

/** Every limit of a product by one policy, with the stored distributions it is judged by. */
export async function limitsScreen(
	db: Connection,
	asked: Parameters<typeof limitsOverview>[1]
): Promise<LimitsScreen> {
	const groups = await limitsOverview(db, asked);
	const distributions = new Map(
		groups.flatMap((group) =>
			group.distributions.map(({ distribution }) => [distribution.conditionKey, distribution])
		)
	);
	const lots = [...distributions.values()].flatMap((of) =>
		independentLots(of).map(({ name }) => name)
	);
	return { groups, distributions, lots: [...new Set(lots)].sort() };
}
