import { eq } from 'drizzle-orm';
import type { DatasheetStatus } from '$lib/core/datasheet/document';
import { draftMessages } from '$lib/core/messages/datasheet';
import { findPolicyVersion } from '../db/findPolicies';
import { draft as draftTable } from '../db/schema';
import type { Stores } from '../work/stores';
import { editDraft, refused, type DraftEditor, type Edit, type Refused } from './editDraft';

/** Changes what the draft is to become, and the policy that new bindings take. */
export async function changeDraftSettings(
	{ db }: Pick<Stores, 'db'>,
	wanted: DraftEditor & { readonly status: DatasheetStatus; readonly policyVersion: number }
): Promise<{ status: 'changed' } | Refused> {
	const { status, policyVersion } = wanted;
	return editDraft(db, wanted, async (tx, { draft }) => {
		if ((await findPolicyVersion(tx, policyVersion)) === undefined)
			return refused(draftMessages.policyVersionUnknown());
		await tx.update(draftTable).set({ status, policyVersion }).where(eq(draftTable.id, draft.id));
		const edit: Edit<{ status: 'changed' }> = {
			status: 'edited',
			action: 'draft.settings',
			what: 'settings',
			details: {
				before: { status: draft.status, policyVersion: draft.policyVersion },
				after: { status, policyVersion }
			},
			result: { status: 'changed' }
		};
		return edit;
	});
}
