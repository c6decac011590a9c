import { eq } from 'drizzle-orm';
import type { Database } from './database';
import { product } from './schema';

/** The product with this part number, or `undefined`. */
export async function findProductByPartNumber(db: Database, partNumber: string) {
	const [found] = await db
		.select()
		.from(product)
		.where(eq(product.partNumber, partNumber))
		.limit(1);
	return found;
}
