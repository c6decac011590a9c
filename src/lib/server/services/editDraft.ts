import { eq, sql } from 'drizzle-orm';
import type { Binding } from '$lib/core/datasheet/binding';
import { draftMessages } from '$lib/core/messages/datasheet';
import { appendAudit } from '../db/appendAudit';
import type { Connection, Database } from '../db/database';
import { findDraft, type FoundDraft } from '../db/findDraft';
import { findPersonName } from '../db/findPersonName';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import { draft, draftEdit, draftSlot } from '../db/schema';
import { write } from '../db/write';

export interface Refused {
	readonly status: 'refused';
	readonly message: string;
}

export const refused = (message: string): Refused => ({ status: 'refused', message });

export interface DraftEditor {
	readonly partNumber: string;
	/** Id of the person who edits. */
	readonly by: string;
}

/** The draft as it stands inside the transaction, and who edits it. */
export interface EditedDraft {
	readonly draft: FoundDraft;
	readonly product: { readonly id: number; readonly partNumber: string };
	readonly name: string;
	readonly at: string;
}

/** What an edit did: every touch is recorded, by its name and in the audit trail. */
export interface Edit<Result> {
	readonly status: 'edited';
	readonly action: string;
	/** What was touched, as `draft_edit` keeps it. */
	readonly what: string;
	readonly details: Readonly<Record<string, unknown>>;
	readonly result: Result;
}

/**
 * One edit of a draft, in one transaction: the change, who touched what, and the audit entry. A
 * refusal records nothing and is handed back.
 */
export async function editDraft<Result>(
	db: Connection,
	{ partNumber, by }: DraftEditor,
	work: (tx: Database, edited: EditedDraft) => Promise<Edit<Result> | Refused>
): Promise<Result | Refused> {
	const at = new Date().toISOString();
	return write(db, async (tx) => {
		const product = await findProductByPartNumber(tx, partNumber);
		if (product === undefined) return refused(draftMessages.productUnknown(partNumber));
		const found = await findDraft(tx, product.id);
		if (found === undefined) return refused(draftMessages.noDraft(partNumber));
		const name = await findPersonName(tx, by);
		const outcome = await work(tx, { draft: found, product, name, at });
		if (outcome.status === 'refused') return outcome;
		await tx.insert(draftEdit).values({ draft: found.id, person: by, what: outcome.what, at });
		await tx
			.update(draft)
			.set({ rowVersion: sql`${draft.rowVersion} + 1` })
			.where(eq(draft.id, found.id));
		await appendAudit(tx, {
			action: outcome.action,
			subject: `${partNumber} draft, ${outcome.what}`,
			by,
			details: outcome.details
		});
		return outcome.result;
	});
}

/** Stores what fills a slot, in place of what filled it before; `null` leaves it unbound. */
export async function storeBinding(
	tx: Database,
	at: { readonly draft: number; readonly slot: string },
	binding: Binding | null
): Promise<void> {
	if (binding === null) {
		await tx
			.delete(draftSlot)
			.where(sql`${draftSlot.draft} = ${at.draft} and ${draftSlot.slot} = ${at.slot}`);
		return;
	}
	await tx
		.insert(draftSlot)
		.values({ ...at, binding })
		.onConflictDoUpdate({
			target: [draftSlot.draft, draftSlot.slot],
			set: { binding, rowVersion: sql`${draftSlot.rowVersion} + 1` }
		});
}
