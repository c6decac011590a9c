import { publicationRecord, versionText } from '$lib/core/datasheet/record';
import { dateInThePast, summaryNeeded, versionMoved } from '$lib/core/messages/publish';
import { revisionIsNot } from '$lib/core/messages/review';
import { mayPublish } from '$lib/core/review/separation';
import { nextRevisionState, REVISION_STATE_WORDS } from '$lib/core/review/states';
import { appendAudit } from '../db/appendAudit';
import { findActor } from '../db/findActor';
import { findHands } from '../db/findHands';
import { findRevisionById } from '../db/findRevision';
import { write } from '../db/write';
import { enqueue } from '../work/enqueue';
import type { Stores } from '../work/stores';
import { proposeRelease } from './proposeRelease';
import { publishKey } from './publishKey';

export type PublishOutcome =
	| { readonly status: 'queued'; readonly job: number; readonly version: string }
	| { readonly status: 'refused'; readonly message: string };

const refused = (message: string): PublishOutcome => ({ status: 'refused', message });

/**
 * Decides how an approved revision is published, and leaves the rendering to a job. The whole
 * publication record is fixed here, the instant included, so that a job that runs twice renders the
 * same bytes.
 */
export async function publishRelease(
	{ db }: Pick<Stores, 'db'>,
	input: {
		readonly revision: number;
		/** ISO date, UTC; today or later. */
		readonly effectiveFrom: string;
		/** The version the person was shown: refused when it has moved since. */
		readonly version?: string;
		/** The line of the revision history; the proposed one by default. */
		readonly summary?: string;
		readonly by: string;
	}
): Promise<PublishOutcome> {
	const at = new Date().toISOString();
	const today = at.slice(0, 10);
	if (input.effectiveFrom < today) return refused(dateInThePast(today));
	if (input.summary?.trim() === '') return refused(summaryNeeded());

	return write(db, async (tx) => {
		const revision = await findRevisionById(tx, input.revision);
		if (revision === undefined) throw new Error(`there is no revision with id ${input.revision}`);
		if (nextRevisionState(revision.state, 'publish') === undefined)
			return refused(
				revisionIsNot(revision.number, 'published', REVISION_STATE_WORDS[revision.state])
			);
		const allowance = mayPublish(await findActor(tx, input.by), await findHands(tx, revision));
		if (!allowance.permitted) return refused(allowance.reason);

		const proposal = await proposeRelease(tx, revision);
		const version = versionText(proposal.version);
		if (input.version !== undefined && input.version !== version)
			return refused(versionMoved(input.version, version));

		const record = publicationRecord.parse({
			kind: 'release',
			version: proposal.version,
			date: input.effectiveFrom,
			at,
			contentHash: revision.sha256,
			previous: proposal.previous && {
				version: proposal.previous.version,
				date: proposal.previous.date
			},
			history: [
				{
					version: proposal.version,
					date: input.effectiveFrom,
					changes: input.summary?.trim() ?? proposal.summary
				},
				...proposal.history
			],
			changedRows: proposal.changedRows
		});
		const job = await enqueue(tx, {
			kind: 'publish-release',
			payload: {
				revision: revision.id,
				record,
				previous: proposal.previous?.id ?? null,
				by: input.by
			},
			dedupeKey: publishKey(revision.id),
			by: input.by
		});
		await appendAudit(tx, {
			action: 'release.request',
			subject: `${revision.partNumber} ${version}`,
			by: input.by,
			details: { revision: revision.number, effectiveFrom: input.effectiveFrom, job }
		});
		return { status: 'queued', job, version };
	});
}
