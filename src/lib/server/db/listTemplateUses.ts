import { asc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { draft, product, templateVersion } from './schema';

/** Which products' drafts use which version of a template, by part number. */
export function listTemplateUses(db: Database, key: string) {
	return db
		.select({
			number: templateVersion.number,
			partNumber: product.partNumber,
			status: draft.status
		})
		.from(draft)
		.innerJoin(templateVersion, eq(draft.templateVersion, templateVersion.id))
		.innerJoin(product, eq(draft.product, product.id))
		.where(eq(templateVersion.template, key))
		.orderBy(asc(product.partNumber));
}
