import { asc, eq } from 'drizzle-orm';
import { groupBy } from '$lib/core/groupBy';
import { dieFacts } from '$lib/core/junction/dieFacts';
import type { Database } from './database';
import { die, product } from './schema';

/** Every die with the part numbers that are made of it, by name. */
export async function listDies(db: Database) {
	const rows = await db
		.select({ id: die.id, name: die.name, facts: die.facts, partNumber: product.partNumber })
		.from(die)
		.leftJoin(product, eq(product.die, die.id))
		.orderBy(asc(die.name), asc(product.partNumber));
	return [...groupBy(rows, ({ id }) => id).values()].flatMap(([first, ...others]) =>
		first === undefined
			? []
			: [
					{
						id: first.id,
						name: first.name,
						facts: dieFacts.parse(first.facts),
						partNumbers: [first, ...others].flatMap(({ partNumber }) => partNumber ?? [])
					}
				]
	);
}
