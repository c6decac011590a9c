import { eq } from 'drizzle-orm';
import { binding, type Binding } from '$lib/core/datasheet/binding';
import { parseTemplate } from '$lib/core/template/readTemplate';
import type { Template } from '$lib/core/template/template';
import type { Database } from './database';
import { draft, draftSlot, draftText, templateVersion } from './schema';

export interface DraftText {
	readonly text: string;
	readonly rowVersion: number;
}

export type FoundDraft = NonNullable<Awaited<ReturnType<typeof findDraft>>>;

/** A product's draft with its template, bindings and texts, or `undefined` while there is none. */
export async function findDraft(db: Database, product: number) {
	const [found] = await db
		.select({ draft, templateVersion })
		.from(draft)
		.innerJoin(templateVersion, eq(draft.templateVersion, templateVersion.id))
		.where(eq(draft.product, product))
		.limit(1);
	if (found === undefined) return undefined;
	const { template: key, number, json } = found.templateVersion;
	const template: Template = parseTemplate(json, `template ${key}, version ${number}`);
	return {
		...found.draft,
		template,
		templateNumber: number,
		bindings: await bindingsOf(db, found.draft.id),
		texts: await textsOf(db, found.draft.id)
	};
}

async function bindingsOf(db: Database, id: number): Promise<ReadonlyMap<string, Binding>> {
	const rows = await db.select().from(draftSlot).where(eq(draftSlot.draft, id));
	return new Map(rows.map((row) => [row.slot, binding.parse(row.binding)]));
}

async function textsOf(db: Database, id: number): Promise<ReadonlyMap<string, DraftText>> {
	const rows = await db.select().from(draftText).where(eq(draftText.draft, id));
	return new Map(rows.map(({ block, text, rowVersion }) => [block, { text, rowVersion }]));
}
