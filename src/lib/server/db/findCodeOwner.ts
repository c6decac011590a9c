import { and, eq, ne } from 'drizzle-orm';
import type { Database } from './database';
import { orderingCode, product } from './schema';

/** The part number of another product that has this ordering code, or `undefined`. */
export async function findCodeOwner(db: Database, code: string, besides: number) {
	const [found] = await db
		.select({ partNumber: product.partNumber })
		.from(orderingCode)
		.innerJoin(product, eq(orderingCode.product, product.id))
		.where(and(eq(orderingCode.code, code), ne(orderingCode.product, besides)))
		.limit(1);
	return found?.partNumber;
}
