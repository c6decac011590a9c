import { sql } from 'drizzle-orm';
import type { Database } from './database';
import { product } from './schema';

/** The part number as it is stored, however its letters are written; `undefined` when it is free. */
export async function findPartNumberIgnoringCase(db: Database, partNumber: string) {
	const [found] = await db
		.select({ partNumber: product.partNumber })
		.from(product)
		.where(sql`lower(${product.partNumber}) = ${partNumber.toLowerCase()}`)
		.limit(1);
	return found?.partNumber;
}
