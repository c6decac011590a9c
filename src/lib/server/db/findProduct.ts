import { eq } from 'drizzle-orm';
import { productClass } from '$lib/core/template/template';
import type { Database } from './database';
import { listOrderingCodes } from './listOrderingCodes';
import { die, product } from './schema';

export type FoundProduct = NonNullable<Awaited<ReturnType<typeof findProduct>>>;

/** A product with the name of its die and its ordering codes, or `undefined`. */
export async function findProduct(db: Database, partNumber: string) {
	const [found] = await db
		.select({
			id: product.id,
			partNumber: product.partNumber,
			die: product.die,
			dieName: die.name,
			elements: product.elements,
			productClass: product.productClass,
			package: product.package,
			description: product.description,
			basisHash: product.basisHash,
			rowVersion: product.rowVersion
		})
		.from(product)
		.innerJoin(die, eq(product.die, die.id))
		.where(eq(product.partNumber, partNumber))
		.limit(1);
	return (
		found && {
			...found,
			productClass: productClass.parse(found.productClass),
			orderingCodes: await listOrderingCodes(db, found.id)
		}
	);
}
