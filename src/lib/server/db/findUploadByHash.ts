import { eq } from 'drizzle-orm';
import type { Database } from './database';
import { product, upload } from './schema';

/** The upload of a file with these contents, or `undefined`: the same readings count once. */
export async function findUploadByHash(db: Database, sha256: string) {
	const [found] = await db
		.select({
			id: upload.id,
			fileName: upload.fileName,
			uploadedAt: upload.uploadedAt,
			partNumber: product.partNumber
		})
		.from(upload)
		.innerJoin(product, eq(product.id, upload.product))
		.where(eq(upload.sha256, sha256))
		.limit(1);
	return found;
}
