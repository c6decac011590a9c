import type { Connection, Transaction } from './database';

const GIVE_UP_AFTER_MILLISECONDS = 10_000;
const LONGEST_PAUSE_MILLISECONDS = 120;

/** The writes of this process, one after the other: two open transactions would block the loop. */
const queues = new WeakMap<Connection, Promise<unknown>>();

const isBusy = (problem: unknown): boolean =>
	problem instanceof Error &&
	(/SQLITE_BUSY|database is locked/.test(problem.message) || isBusy(problem.cause));

const pause = (milliseconds: number) => new Promise((next) => setTimeout(next, milliseconds));

/** Longer with each attempt and never the same twice, so that two waiting processes part. */
const pauseAfter = (attempt: number) =>
	Math.min(LONGEST_PAUSE_MILLISECONDS, 4 * 2 ** attempt) * (0.5 + Math.random() / 2);

/**
 * The only way to write: one transaction at a time in this process, begun immediately. While
 * another process holds the lock it is tried again without stalling the event loop, for up to 10 s.
 *
 * @throws what `work` throws, with everything it wrote undone
 */
export function write<Result>(
	db: Connection,
	work: (tx: Transaction) => Promise<Result>
): Promise<Result> {
	const before = queues.get(db) ?? Promise.resolve();
	const mine = before.then(
		() => attempt(db, work),
		() => attempt(db, work)
	);
	queues.set(db, mine);
	return mine;
}

async function attempt<Result>(
	db: Connection,
	work: (tx: Transaction) => Promise<Result>
): Promise<Result> {
	const deadline = Date.now() + GIVE_UP_AFTER_MILLISECONDS;
	for (let count = 0; ; count += 1) {
		try {
			// libSQL's own default mode is `write`: BEGIN IMMEDIATE.
			return await db.transaction(work);
		} catch (problem) {
			if (!isBusy(problem) || Date.now() > deadline) throw problem;
			await pause(pauseAfter(count));
		}
	}
}
