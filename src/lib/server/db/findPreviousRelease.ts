import { desc, eq } from 'drizzle-orm';
import { readDocument } from '$lib/core/datasheet/readDocument';
import { versionText } from '$lib/core/datasheet/record';
import type { Database } from './database';
import { release, revision } from './schema';

/**
 * What the next release of a product is set against: the highest version, with its document;
 * `undefined` before the first. A withdrawn one counts: it is what readers had in their hands last.
 */
export async function findPreviousRelease(db: Database, product: number) {
	const [found] = await db
		.select({
			id: release.id,
			major: release.major,
			minor: release.minor,
			effectiveFrom: release.effectiveFrom,
			sha256: revision.sha256,
			document: revision.document
		})
		.from(release)
		.innerJoin(revision, eq(release.revision, revision.id))
		.where(eq(release.product, product))
		.orderBy(desc(release.major), desc(release.minor))
		.limit(1);
	return found && { ...found, version: versionText(found), document: readDocument(found.document) };
}
