import { eq } from 'drizzle-orm';
import { dieFacts, type DieFacts } from '$lib/core/junction/dieFacts';
import type { Database } from './database';
import { die, product } from './schema';

/** What is known of the die of a product; `undefined` where its facts are not complete. */
export async function findProductDie(
	db: Database,
	productId: number
): Promise<{ readonly name: string; readonly facts: DieFacts } | undefined> {
	const [found] = await db
		.select({ name: die.name, facts: die.facts })
		.from(product)
		.innerJoin(die, eq(die.id, product.die))
		.where(eq(product.id, productId))
		.limit(1);
	const facts = dieFacts.safeParse(found?.facts);
	return found && facts.success ? { name: found.name, facts: facts.data } : undefined;
}
