import { eq, inArray } from 'drizzle-orm';
import { groupBy } from '$lib/core/groupBy';
import type { DatasheetState } from '$lib/core/review/datasheetState';
import { releasesOn, type SettledRelease } from '$lib/core/review/settleReleases';
import { OPEN_REVISION_STATES } from '$lib/core/review/states';
import type { Database } from './database';
import { draft, release, revision } from './schema';

const NOTHING: DatasheetState = { release: null, openRevision: null, draft: null };

/** The current release, else the highest version of the others. */
function shown(releases: readonly SettledRelease[]) {
	const [highest] = releases.toSorted((a, b) => b.major - a.major || b.minor - a.minor);
	return releases.find(({ state }) => state === 'current') ?? highest ?? null;
}

/**
 * How far the datasheet of each product has come, by product id; products without any are left out.
 *
 * @param today ISO date in UTC: scheduled releases become current on their day
 * @param only one product, for its own pages
 */
export async function listDatasheetStates(
	db: Database,
	today: string,
	only?: number
): Promise<Map<number, DatasheetState>> {
	const [releases, revisions, drafts] = await Promise.all([
		db
			.select({
				id: release.id,
				product: release.product,
				major: release.major,
				minor: release.minor,
				state: release.state,
				effectiveFrom: release.effectiveFrom
			})
			.from(release)
			.where(only === undefined ? undefined : eq(release.product, only)),
		db
			.select({ product: revision.product, number: revision.number, state: revision.state })
			.from(revision)
			.where(inArray(revision.state, OPEN_REVISION_STATES)),
		db.select({ product: draft.product, status: draft.status }).from(draft)
	]);
	const states = new Map<number, DatasheetState>();
	const change = (product: number, part: Partial<DatasheetState>) => {
		if (only === undefined || product === only)
			states.set(product, { ...(states.get(product) ?? NOTHING), ...part });
	};
	for (const [product, own] of groupBy(releases, (row) => row.product)) {
		const found = shown(releasesOn(own, today));
		if (found)
			change(product, { release: { major: found.major, minor: found.minor, state: found.state } });
	}
	for (const { product, number, state } of revisions)
		change(product, { openRevision: { number, state } });
	for (const { product, status } of drafts) change(product, { draft: status });
	return states;
}
