import { and, desc, eq } from 'drizzle-orm';
import type { Database } from './database';
import { draftEdit, person } from './schema';

/** What a touch of a text block is recorded as. */
export const textEdit = (block: string) => `text ${block}`;

/** Who wrote a text block last, or `undefined` for a text nobody touched. */
export async function findLastTextEditor(db: Database, draft: number, block: string) {
	const [last] = await db
		.select({ name: person.name, at: draftEdit.at })
		.from(draftEdit)
		.innerJoin(person, eq(draftEdit.person, person.id))
		.where(and(eq(draftEdit.draft, draft), eq(draftEdit.what, textEdit(block))))
		.orderBy(desc(draftEdit.id))
		.limit(1);
	return last;
}
