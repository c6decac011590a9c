import { and, eq } from 'drizzle-orm';
import type { Database } from './database';
import { releaseFile } from './schema';

/** A file of a release by its name, or `undefined`. */
export async function findReleaseFile(db: Database, release: number, name: string) {
	const [found] = await db
		.select()
		.from(releaseFile)
		.where(and(eq(releaseFile.release, release), eq(releaseFile.name, name)))
		.limit(1);
	return found;
}
