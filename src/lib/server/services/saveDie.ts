import { and, eq } from 'drizzle-orm';
import type { DieFacts } from '$lib/core/junction/dieFacts';
import { productMessages } from '$lib/core/messages/products';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { findDie, findDieByName, type FoundDie } from '../db/findDie';
import { die } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

export interface DieToSave {
	/** `null` for a new one. */
	readonly id: number | null;
	/** The version the person opened. */
	readonly rowVersion: number;
	readonly name: string;
	readonly facts: DieFacts;
	readonly by: string;
}

export type SaveDieOutcome =
	| { readonly status: 'saved'; readonly id: number }
	| { readonly status: 'refused'; readonly field: 'name' | ''; readonly message: string }
	/** Somebody saved another version after this one was opened. */
	| { readonly status: 'stale'; readonly saved: FoundDie };

const refused = (field: 'name' | '', message: string): SaveDieOutcome => ({
	status: 'refused',
	field,
	message
});

/** Creates or changes a die. Only the version that was opened is replaced. */
export function saveDie(
	{ db }: Pick<Stores, 'db'>,
	{ id, rowVersion, name, facts, by }: DieToSave
): Promise<SaveDieOutcome> {
	const at = new Date().toISOString();
	return write(db, async (tx): Promise<SaveDieOutcome> => {
		const namesake = await findDieByName(tx, name);
		if (namesake !== undefined && namesake.id !== id)
			return refused('name', productMessages.dieNameTaken(namesake.name));
		if (id === null) {
			const created = await createDie(tx, { name, facts, createdAt: at });
			await appendAudit(tx, {
				action: 'die.create',
				subject: `die ${name}`,
				by,
				details: { facts }
			});
			return { status: 'saved', id: created };
		}
		const stored = await findDie(tx, id);
		if (stored === undefined) return refused('', productMessages.noSuchDie());
		if (stored.rowVersion !== rowVersion) return { status: 'stale', saved: stored };
		await tx
			.update(die)
			.set({ name, facts, rowVersion: rowVersion + 1 })
			.where(and(eq(die.id, id), eq(die.rowVersion, rowVersion)));
		await appendAudit(tx, {
			action: 'die.change',
			subject: `die ${name}`,
			by,
			details: { before: { name: stored.name, facts: stored.facts }, after: { name, facts } }
		});
		return { status: 'saved', id };
	});
}

async function createDie(tx: Database, values: typeof die.$inferInsert): Promise<number> {
	const [created] = await tx.insert(die).values(values).returning({ id: die.id });
	if (created === undefined) throw new Error('the die was not stored');
	return created.id;
}
