import { and, desc, eq, ne } from 'drizzle-orm';
import { uploadProblems } from '$lib/core/measurements/problems';
import type { Database } from './database';
import { person, upload } from './schema';

/** The uploads of a product that are no measurement set yet, newest first. */
export async function listUploads(db: Database, productId: number) {
	const uploads = await db
		.select({
			id: upload.id,
			fileName: upload.fileName,
			byteSize: upload.byteSize,
			state: upload.state,
			problems: upload.problems,
			uploadedAt: upload.uploadedAt,
			uploadedByName: person.name
		})
		.from(upload)
		.innerJoin(person, eq(person.id, upload.uploadedBy))
		.where(and(eq(upload.product, productId), ne(upload.state, 'accepted')))
		.orderBy(desc(upload.id));
	return uploads.map((entry) => ({
		...entry,
		problems: entry.problems === null ? null : uploadProblems.parse(entry.problems)
	}));
}
