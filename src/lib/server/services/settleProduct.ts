import { eq } from 'drizzle-orm';
import { settleReleases } from '$lib/core/review/settleReleases';
import { versionText } from '$lib/core/datasheet/record';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { product, release } from '../db/schema';

/**
 * Writes down what the calendar made of a product's releases. Pages don't wait for it: they read
 * the states as of today (`releasesOn`); this keeps the stored ones and the audit trail in step.
 */
export async function settleProduct(tx: Database, id: number, at: string): Promise<void> {
	const releases = await tx
		.select({
			id: release.id,
			major: release.major,
			minor: release.minor,
			effectiveFrom: release.effectiveFrom,
			state: release.state,
			partNumber: product.partNumber
		})
		.from(release)
		.innerJoin(product, eq(release.product, product.id))
		.where(eq(release.product, id));
	for (const move of settleReleases(releases, at.slice(0, 10))) {
		const moved = releases.find((entry) => entry.id === move.id);
		await tx.update(release).set({ state: move.to }).where(eq(release.id, move.id));
		if (moved)
			await appendAudit(tx, {
				action: `release.${move.event}`,
				subject: `${moved.partNumber} ${versionText(moved)}`,
				by: null,
				details: { effectiveFrom: moved.effectiveFrom }
			});
	}
}
