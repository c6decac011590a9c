import { asc, countDistinct, eq } from 'drizzle-orm';
import { productClass } from '$lib/core/template/template';
import type { Database } from './database';
import { die, lot, product } from './schema';

export type ListedProduct = Awaited<ReturnType<typeof listProducts>>[number];

/** Every product with its die and how many independent lots it was measured in, by part number. */
export async function listProducts(db: Database) {
	const products = await db
		.select({
			id: product.id,
			partNumber: product.partNumber,
			productClass: product.productClass,
			package: product.package,
			description: product.description,
			elements: product.elements,
			dieName: die.name,
			lots: countDistinct(lot.waferLot)
		})
		.from(product)
		.innerJoin(die, eq(product.die, die.id))
		.leftJoin(lot, eq(lot.product, product.id))
		.groupBy(product.id)
		.orderBy(asc(product.partNumber));
	return products.map((row) => ({ ...row, productClass: productClass.parse(row.productClass) }));
}
