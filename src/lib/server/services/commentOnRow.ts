import { commentNeeded, rowNotFound } from '$lib/core/messages/review';
import { appendAudit } from '../db/appendAudit';
import { findRevisionById } from '../db/findRevision';
import { listVerificationRows } from '../db/listVerificationRows';
import { comment } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

export type CommentOutcome =
	{ readonly status: 'commented' } | { readonly status: 'refused'; readonly message: string };

/** Adds a comment to a row, or to the revision as a whole. Whatever its state: talk goes on. */
export async function commentOnRow(
	{ db }: Pick<Stores, 'db'>,
	input: {
		readonly revision: number;
		/** `null` for the revision as a whole. */
		readonly row: string | null;
		readonly text: string;
		readonly by: string;
	}
): Promise<CommentOutcome> {
	const at = new Date().toISOString();
	const text = input.text.trim();
	if (text === '') return { status: 'refused', message: commentNeeded() };
	return write(db, async (tx) => {
		const revision = await findRevisionById(tx, input.revision);
		if (revision === undefined) throw new Error(`there is no revision with id ${input.revision}`);
		const rows = await listVerificationRows(tx, revision.id);
		if (input.row !== null && !rows.some(({ row }) => row === input.row))
			return { status: 'refused', message: rowNotFound(input.row) };

		await tx
			.insert(comment)
			.values({ revision: revision.id, row: input.row, text, by: input.by, at });
		await appendAudit(tx, {
			action: 'revision.comment',
			subject: `${revision.partNumber} revision ${revision.number}`,
			by: input.by,
			details: { row: input.row, text }
		});
		return { status: 'commented' };
	});
}
