import { and, eq, sql } from 'drizzle-orm';
import type { Database } from './database';
import { distribution, product } from './schema';

/** The start of a condition key, `T=25`, up to its first semicolon. */
const temperature = sql<string>`substr(${distribution.conditionKey} || ';', 3, instr(${distribution.conditionKey} || ';', ';') - 3)`;

/** At which junction temperatures in °C each product has distributions, rising, by product id. */
export async function listMeasuredTemperatures(db: Database): Promise<Map<number, number[]>> {
	const found = await db
		.selectDistinct({ product: distribution.product, temperature })
		.from(distribution)
		.innerJoin(
			product,
			and(eq(product.id, distribution.product), eq(product.basisHash, distribution.basisHash))
		);
	const byProduct = new Map<number, number[]>();
	for (const row of found)
		byProduct.set(row.product, [...(byProduct.get(row.product) ?? []), Number(row.temperature)]);
	return new Map([...byProduct].map(([id, all]) => [id, all.toSorted((a, b) => a - b)]));
}
