import { AsyncLocalStorage } from 'node:async_hooks';
import type { Connection, Transaction } from './database';

const GIVE_UP_AFTER_MILLISECONDS = 10_000;
const LONGEST_PAUSE_MILLISECONDS = 120;

/** The writes of this process, one after the other: two open transactions would block the loop. */
const queues = new WeakMap<Connection, Promise<unknown>>();

/** The write that the running code is a part of. */
const around = new AsyncLocalStorage<{ readonly db: Connection; isOpen: boolean }>();

/** A write that waits for the write it stands in would wait for ever. */
export class NestedWriteError extends Error {
	override readonly name = 'NestedWriteError';
	constructor() {
		super('a write was begun inside a write; hand its transaction on instead');
	}
}

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
 * @throws {NestedWriteError} inside the work of another write
 */
export async function write<Result>(
	db: Connection,
	work: (tx: Transaction) => Promise<Result>
): Promise<Result> {
	const outer = around.getStore();
	if (outer?.isOpen && outer.db === db) throw new NestedWriteError();

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
		const state = { db, isOpen: true };
		try {
			return await around.run(state, () => db.transaction(work));
		} catch (problem) {
			if (!isBusy(problem) || Date.now() > deadline) throw problem;
			await pause(pauseAfter(count));
		} finally {
			state.isOpen = false;
		}
	}
}
