import { eq } from 'drizzle-orm';
import {
	documentDamaged,
	reasonNeeded,
	revisionIsNot,
	rowsStillOpen
} from '$lib/core/messages/review';
import { mayDecide } from '$lib/core/review/separation';
import { nextRevisionState, REVISION_STATE_WORDS } from '$lib/core/review/states';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { findActor } from '../db/findActor';
import { findHands } from '../db/findHands';
import { findRevisionById } from '../db/findRevision';
import { listVerificationRows } from '../db/listVerificationRows';
import { decision, revision as revisionTable } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { sha256 } from './sha256';

export type DecideOutcome =
	| { readonly status: 'approved' | 'returned' }
	| { readonly status: 'refused'; readonly message: string };

const refused = (message: string): DecideOutcome => ({ status: 'refused', message });

/**
 * Approves a revision, or returns it with a reason. Approving needs every row ticked, and speaks of
 * the stored bytes: they are hashed again. After a return the draft, which stayed open, is what the
 * next submission comes from; the comments stay with the returned revision and show on the draft.
 */
export async function decideRevision(
	{ db }: Pick<Stores, 'db'>,
	input: {
		readonly revision: number;
		readonly decision: 'approve' | 'return';
		/** Needed with a return. */
		readonly reason?: string;
		readonly by: string;
	}
): Promise<DecideOutcome> {
	const at = new Date().toISOString();
	const reason = input.reason?.trim() ?? '';
	if (input.decision === 'return' && reason === '') return refused(reasonNeeded());
	return write(db, async (tx) => {
		const revision = await findRevisionById(tx, input.revision);
		if (revision === undefined) throw new Error(`there is no revision with id ${input.revision}`);
		const allowance = mayDecide(await findActor(tx, input.by), await findHands(tx, revision));
		if (!allowance.permitted) return refused(allowance.reason);
		const state = nextRevisionState(revision.state, input.decision);
		if (state === undefined || state === 'published' || state === 'inReview')
			return refused(
				revisionIsNot(
					revision.number,
					input.decision === 'approve' ? 'approved' : 'returned',
					REVISION_STATE_WORDS[revision.state]
				)
			);
		if (input.decision === 'approve') {
			const problem = await problemOfApproval(tx, revision);
			if (problem !== undefined) return refused(problem);
		}

		await tx.update(revisionTable).set({ state }).where(eq(revisionTable.id, revision.id));
		await tx
			.insert(decision)
			.values({ revision: revision.id, event: input.decision, reason, by: input.by, at });
		await appendAudit(tx, {
			action: `revision.${input.decision}`,
			subject: `${revision.partNumber} revision ${revision.number}`,
			by: input.by,
			details: { sha256: revision.sha256, ...(reason === '' ? {} : { reason }) }
		});
		return { status: state };
	});
}

async function problemOfApproval(
	tx: Database,
	revision: { readonly id: number; readonly document: Uint8Array; readonly sha256: string }
): Promise<string | undefined> {
	const hash = sha256(revision.document);
	if (hash !== revision.sha256) return documentDamaged();
	const rows = await listVerificationRows(tx, revision.id);
	const open = rows.filter(({ state }) => state === 'open').length;
	const flagged = rows.filter(({ state }) => state === 'flagged').length;
	return open + flagged > 0 ? rowsStillOpen(open, flagged) : undefined;
}
