import { asc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { orderingCode } from './schema';

/** The ordering codes of a product, in the order they were written. */
export function listOrderingCodes(db: Database, product: number) {
	return db
		.select({
			code: orderingCode.code,
			grade: orderingCode.grade,
			marking: orderingCode.marking,
			packing: orderingCode.packing,
			quantity: orderingCode.quantity
		})
		.from(orderingCode)
		.where(eq(orderingCode.product, product))
		.orderBy(asc(orderingCode.id));
}
