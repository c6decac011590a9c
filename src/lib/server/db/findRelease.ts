import { and, eq, type SQL } from 'drizzle-orm';
import { publicationRecord } from '$lib/core/datasheet/record';
import type { Database } from './database';
import { product, release, revision } from './schema';

export type FoundRelease = NonNullable<Awaited<ReturnType<typeof findReleaseById>>>;

/** The release of a product with this version (`2.1`), or `undefined` if it was never published. */
export async function findRelease(db: Database, partNumber: string, version: string) {
	const [, major, minor] = /^(\d{1,6})\.(\d{1,6})$/.exec(version) ?? [];
	if (major === undefined || minor === undefined) return undefined;
	return findOne(
		db,
		and(
			eq(product.partNumber, partNumber),
			eq(release.major, Number(major)),
			eq(release.minor, Number(minor))
		)
	);
}

/** The release with this id, or `undefined`. */
export function findReleaseById(db: Database, id: number) {
	return findOne(db, eq(release.id, id));
}

/** The release a revision became, or `undefined`. */
export function findReleaseOfRevision(db: Database, id: number) {
	return findOne(db, eq(release.revision, id));
}

async function findOne(db: Database, where: SQL | undefined) {
	const [found] = await db
		.select({
			id: release.id,
			product: product.id,
			partNumber: product.partNumber,
			major: release.major,
			minor: release.minor,
			state: release.state,
			effectiveFrom: release.effectiveFrom,
			rendererVersion: release.rendererVersion,
			record: release.record,
			revision: revision.id,
			document: revision.document,
			contentHash: revision.sha256
		})
		.from(release)
		.innerJoin(product, eq(release.product, product.id))
		.innerJoin(revision, eq(release.revision, revision.id))
		.where(where)
		.limit(1);
	return found && { ...found, record: publicationRecord.parse(found.record) };
}
