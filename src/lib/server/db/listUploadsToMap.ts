import { asc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { person, product, upload } from './schema';

/** Files that were read and wait for somebody to say what their columns mean. */
export function listUploadsToMap(db: Database) {
	return db
		.select({
			partNumber: product.partNumber,
			upload: upload.id,
			fileName: upload.fileName,
			uploadedByName: person.name,
			since: upload.uploadedAt
		})
		.from(upload)
		.innerJoin(product, eq(upload.product, product.id))
		.innerJoin(person, eq(upload.uploadedBy, person.id))
		.where(eq(upload.state, 'read'))
		.orderBy(asc(upload.uploadedAt));
}
