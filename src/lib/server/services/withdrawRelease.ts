import { eq } from 'drizzle-orm';
import { versionText } from '$lib/core/datasheet/record';
import { releaseIsNot } from '$lib/core/messages/publish';
import { reasonNeeded, rolesDoNotAllow } from '$lib/core/messages/review';
import { isPermitted } from '$lib/core/review/permissions';
import { releasesOn } from '$lib/core/review/settleReleases';
import { nextReleaseState, RELEASE_STATE_WORDS } from '$lib/core/review/states';
import { appendAudit } from '../db/appendAudit';
import { findActor } from '../db/findActor';
import { findReleaseById } from '../db/findRelease';
import { decision, release } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { settleProduct } from './settleProduct';

export type WithdrawOutcome =
	| { readonly status: 'withdrawn' | 'reinstated' }
	| { readonly status: 'refused'; readonly message: string };

export interface WithdrawInput {
	/** Id of the release. */
	readonly release: number;
	readonly reason: string;
	readonly by: string;
}

/** Takes a release back: its files are no longer handed out, its version is never used again. */
export function withdrawRelease(stores: Pick<Stores, 'db'>, input: WithdrawInput) {
	return changeRelease(stores, input, 'withdraw');
}

/** Brings a withdrawn release back: its day and the versions beside it decide what it is then. */
export function reinstateRelease(stores: Pick<Stores, 'db'>, input: WithdrawInput) {
	return changeRelease(stores, input, 'reinstate');
}

const WORDS = { withdraw: 'withdrawn', reinstate: 'reinstated' } as const;

async function changeRelease(
	{ db }: Pick<Stores, 'db'>,
	input: WithdrawInput,
	event: 'withdraw' | 'reinstate'
): Promise<WithdrawOutcome> {
	const at = new Date().toISOString();
	const reason = input.reason.trim();
	if (reason === '') return { status: 'refused', message: reasonNeeded() };
	return write(db, async (tx) => {
		const found = await findReleaseById(tx, input.release);
		if (found === undefined) throw new Error(`there is no release with id ${input.release}`);
		const { roles } = await findActor(tx, input.by);
		if (!isPermitted(roles, 'release.publish'))
			return { status: 'refused', message: rolesDoNotAllow(`have a release ${WORDS[event]}`) };

		await settleProduct(tx, found.product, at);
		const [settled = found] = releasesOn([found], at.slice(0, 10));
		const state = nextReleaseState(settled.state, event);
		const version = versionText(found);
		if (state === undefined)
			return {
				status: 'refused',
				message: releaseIsNot(version, WORDS[event], RELEASE_STATE_WORDS[settled.state])
			};
		await tx.update(release).set({ state }).where(eq(release.id, found.id));
		await tx.insert(decision).values({ revision: found.revision, event, reason, by: input.by, at });
		await appendAudit(tx, {
			action: `release.${event}`,
			subject: `${found.partNumber} ${version}`,
			by: input.by,
			details: { reason }
		});
		await settleProduct(tx, found.product, at);
		return { status: WORDS[event] };
	});
}
