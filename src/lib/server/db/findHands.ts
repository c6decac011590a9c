import type { RevisionHands } from '$lib/core/review/separation';
import type { Database } from './database';
import type { FoundRevision } from './findRevision';
import { listDecisions } from './listDecisions';

/** Who had their hands in a revision. */
export async function findHands(
	db: Database,
	revision: Pick<FoundRevision, 'id' | 'submittedBy' | 'editors'>
): Promise<RevisionHands> {
	const decisions = await listDecisions(db, revision.id);
	const approval = decisions.findLast(({ event }) => event === 'approve');
	return {
		submittedBy: revision.submittedBy,
		editors: revision.editors,
		approvedBy: approval?.by ?? null
	};
}
