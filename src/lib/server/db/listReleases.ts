import { desc, eq, inArray } from 'drizzle-orm';
import { publicationRecord } from '$lib/core/datasheet/record';
import type { Database } from './database';
import { person, release, releaseFile, revision } from './schema';

export type ListedRelease = Awaited<ReturnType<typeof listReleases>>[number];

/** Every release of a product, highest version first, as its states were last written down. */
export async function listReleases(db: Database, product: number) {
	const releases = await db
		.select({
			id: release.id,
			major: release.major,
			minor: release.minor,
			state: release.state,
			effectiveFrom: release.effectiveFrom,
			publishedAt: release.publishedAt,
			publishedByName: person.name,
			record: release.record,
			revision: release.revision,
			revisionNumber: revision.number,
			sha256: revision.sha256
		})
		.from(release)
		.innerJoin(person, eq(release.publishedBy, person.id))
		.innerJoin(revision, eq(release.revision, revision.id))
		.where(eq(release.product, product))
		.orderBy(desc(release.major), desc(release.minor));
	const files = await listFiles(
		db,
		releases.map(({ id }) => id)
	);
	return releases.map((entry) => ({
		...entry,
		record: publicationRecord.parse(entry.record),
		files: files.filter((file) => file.release === entry.id)
	}));
}

function listFiles(db: Database, releases: readonly number[]) {
	return db
		.select({
			release: releaseFile.release,
			name: releaseFile.name,
			mediaType: releaseFile.mediaType,
			sha256: releaseFile.sha256,
			byteSize: releaseFile.byteSize
		})
		.from(releaseFile)
		.where(inArray(releaseFile.release, [...releases]))
		.orderBy(desc(releaseFile.name));
}
