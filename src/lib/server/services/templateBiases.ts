import { eq } from 'drizzle-orm';
import { parseTemplate } from '$lib/core/template/readTemplate';
import type { Template } from '$lib/core/template/template';
import type { Database } from '../db/database';
import { listTemplates } from '../db/findTemplates';
import { draft, product, templateVersion } from '../db/schema';
import { CAPACITANCE } from './readBasis';

/**
 * The biases that datasheets of a product ask a capacitance for: those of its draft's template, and
 * of the newest templates of its class, from which the next draft is opened. In V, each once.
 */
export async function templateBiases(db: Database, productId: number): Promise<number[]> {
	return [...new Set((await templatesOf(db, productId)).flatMap(biasesOf))];
}

/** The template of a product's draft, and the newest of its class. */
export async function templatesOf(db: Database, productId: number): Promise<Template[]> {
	const [owner] = await db.select().from(product).where(eq(product.id, productId)).limit(1);
	const [drafted] = await db
		.select({ json: templateVersion.json })
		.from(draft)
		.innerJoin(templateVersion, eq(templateVersion.id, draft.templateVersion))
		.where(eq(draft.product, productId))
		.limit(1);
	const newest = (await listTemplates(db))
		.map(({ template }) => template)
		.filter(({ productClass }) => productClass === owner?.productClass);
	return drafted ? [...newest, parseTemplate(drafted.json, 'the template of the draft')] : newest;
}

function biasesOf({ sections }: Template): number[] {
	return sections.flatMap((section) => {
		if (section.kind === 'capacitance-table') return section.biases;
		if (section.kind !== 'characteristics') return [];
		return section.slots.flatMap(({ characteristic, reverseVoltage }) =>
			characteristic === CAPACITANCE.characteristic && reverseVoltage !== undefined
				? [reverseVoltage]
				: []
		);
	});
}
