import { and, asc, eq, lt, or } from 'drizzle-orm';
import { jobGaveUp } from '$lib/core/messages';
import type { Connection, Database } from '../db/database';
import { job } from '../db/schema';
import { write } from '../db/write';
import type { JobProgress } from './jobHandler';

/** How long a job is held without a heartbeat before whoever sees it may take it up again. */
export const LEASE_MILLISECONDS = 30_000;

const MOST_ATTEMPTS = 3;

export interface ClaimedJob {
	readonly id: number;
	readonly kind: string;
	readonly payload: unknown;
	/** The fence: every write about the job names it. */
	readonly attempt: number;
}

const leaseFrom = (now: number) => new Date(now + LEASE_MILLISECONDS).toISOString();
const instant = () => new Date().toISOString();

/** The oldest job that is queued, or whose lease has run out. */
async function findClaimable(db: Database, now: string) {
	const [found] = await db
		.select({ id: job.id, kind: job.kind, payload: job.payload, attempt: job.attempt })
		.from(job)
		.where(or(eq(job.state, 'queued'), and(eq(job.state, 'running'), lt(job.leaseUntil, now))))
		.orderBy(asc(job.id))
		.limit(1);
	return found;
}

/** Takes the next job under a lease, or `undefined` when none waits. */
export async function claimJob(db: Connection): Promise<ClaimedJob | undefined> {
	// A look without the lock first: most of the time there is nothing, and nothing to lock for.
	if ((await findClaimable(db, instant())) === undefined) return undefined;

	return write(db, async (tx) => {
		const now = Date.now();
		for (;;) {
			const found = await findClaimable(tx, new Date(now).toISOString());
			if (found === undefined) return undefined;

			const attempt = found.attempt + 1;
			const isOver = attempt > MOST_ATTEMPTS;
			await tx
				.update(job)
				.set(
					isOver
						? { state: 'failed', error: jobGaveUp(MOST_ATTEMPTS), endedAt: instant() }
						: { state: 'running', attempt, leaseUntil: leaseFrom(now) }
				)
				.where(eq(job.id, found.id));
			if (!isOver) return { ...found, attempt };
		}
	});
}

type Held = Pick<ClaimedJob, 'id' | 'attempt'>;

const isHeld = ({ id, attempt }: Held) =>
	and(eq(job.id, id), eq(job.attempt, attempt), eq(job.state, 'running'));

/** Whether this attempt is still the newest. */
export async function isCurrentAttempt(db: Database, held: Held): Promise<boolean> {
	const [found] = await db.select({ id: job.id }).from(job).where(isHeld(held)).limit(1);
	return found !== undefined;
}

async function change(
	db: Connection,
	held: Held,
	values: Partial<typeof job.$inferInsert>
): Promise<boolean> {
	const changed = await write(db, (tx) =>
		tx.update(job).set(values).where(isHeld(held)).returning({ id: job.id })
	);
	return changed.length > 0;
}

/** Prolongs the lease; answers `false` when somebody else holds the job by now. */
export const prolongLease = (db: Connection, held: Held, progress?: JobProgress) =>
	change(db, held, {
		leaseUntil: leaseFrom(Date.now()),
		...(progress === undefined ? {} : { progress })
	});

export const finishJob = (db: Connection, held: Held, result: unknown) =>
	change(db, held, { state: 'done', result, leaseUntil: null, endedAt: instant() });

/** Ends the job with a sentence for people. */
export const failJob = (db: Connection, held: Held, error: string) =>
	change(db, held, { state: 'failed', error, leaseUntil: null, endedAt: instant() });

/**
 * Puts the job back into the queue. The attempt counts after its thread died; it does not when the
 * process ended in order, and its number is free again, since nothing runs under it any more.
 */
export const releaseJob = (
	db: Connection,
	held: Held,
	{ isCounted }: { readonly isCounted: boolean }
) =>
	change(db, held, {
		state: 'queued',
		leaseUntil: null,
		...(isCounted ? {} : { attempt: held.attempt - 1 })
	});
