import { eq, type SQL } from 'drizzle-orm';
import { z } from 'zod';
import type { Database } from './database';
import { measurementSet, product, revision, upload } from './schema';

/** What payloads of jobs name their subject by. */
const subject = z.object({
	product: z.number().optional(),
	upload: z.number().optional(),
	set: z.number().optional(),
	revision: z.number().optional()
});

/** The part number of the product that a job's payload leads to, or `undefined`. */
export async function findJobProduct(db: Database, payload: unknown): Promise<string | undefined> {
	const named = subject.safeParse(payload);
	if (!named.success) return undefined;
	const { data } = named;
	if (data.product !== undefined) return partNumber(db, eq(product.id, data.product));
	const [found] =
		data.upload !== undefined
			? await db.select({ id: upload.product }).from(upload).where(eq(upload.id, data.upload))
			: data.set !== undefined
				? await db
						.select({ id: measurementSet.product })
						.from(measurementSet)
						.where(eq(measurementSet.id, data.set))
				: data.revision !== undefined
					? await db
							.select({ id: revision.product })
							.from(revision)
							.where(eq(revision.id, data.revision))
					: [];
	return found && partNumber(db, eq(product.id, found.id));
}

async function partNumber(db: Database, where: SQL): Promise<string | undefined> {
	const [found] = await db
		.select({ partNumber: product.partNumber })
		.from(product)
		.where(where)
		.limit(1);
	return found?.partNumber;
}
