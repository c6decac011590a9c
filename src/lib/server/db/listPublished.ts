import { asc, desc, eq } from 'drizzle-orm';
import { releasesOn } from '$lib/core/review/settleReleases';
import type { Database } from './database';
import { product, release, releaseFile, revision } from './schema';

export type PublishedRelease = Awaited<ReturnType<typeof listPublished>>[number];

/**
 * Every release of every product, by part number and newest version first, in the states they are
 * in today.
 *
 * @param today ISO date, UTC
 */
export async function listPublished(db: Database, today: string) {
	const found = await db
		.select({
			id: release.id,
			product: product.id,
			partNumber: product.partNumber,
			productClass: product.productClass,
			package: product.package,
			description: product.description,
			major: release.major,
			minor: release.minor,
			state: release.state,
			effectiveFrom: release.effectiveFrom,
			sha256: releaseFile.sha256,
			contentHash: revision.sha256
		})
		.from(release)
		.innerJoin(product, eq(release.product, product.id))
		.innerJoin(revision, eq(release.revision, revision.id))
		.innerJoin(releaseFile, eq(releaseFile.release, release.id))
		.where(eq(releaseFile.name, 'datasheet.pdf'))
		.orderBy(asc(product.partNumber), desc(release.major), desc(release.minor));
	const products = [...new Set(found.map((entry) => entry.product))];
	return products.flatMap((id) =>
		releasesOn(
			found.filter((entry) => entry.product === id),
			today
		)
	);
}
