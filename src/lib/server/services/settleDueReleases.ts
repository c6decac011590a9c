import { and, eq, lte } from 'drizzle-orm';
import { release } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { settleProduct } from './settleProduct';

/** Lets every scheduled release whose day has come take effect. Called at start and now and then. */
export async function settleDueReleases({ db }: Pick<Stores, 'db'>): Promise<number> {
	const at = new Date().toISOString();
	const due = await db
		.selectDistinct({ product: release.product })
		.from(release)
		.where(and(eq(release.state, 'scheduled'), lte(release.effectiveFrom, at.slice(0, 10))));
	for (const { product } of due) await write(db, (tx) => settleProduct(tx, product, at));
	return due.length;
}
