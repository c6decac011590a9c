import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { RefusalError } from '$lib/core/errors';
import { jobFailed } from '$lib/core/messages';
import { openTestDatabase } from '../../../../tests/factories/testDatabase';
import { unreachableStorage } from '../../../../tests/factories/unreachableStorage';
import type { OpenDatabase } from '../db/client';
import { job } from '../db/schema';
import { write } from '../db/write';
import { openLog } from '../logging';
import { enqueue } from './enqueue';
import type { JobHandler } from './jobHandler';
import { inlinePlace } from './jobPlace';
import type { JobPlace } from './jobPlace';
import { startRunner } from './runner';
import type { Runner } from './runner';
import { JobFailedError, runOpenJobs } from './runOpenJobs';

let opened: OpenDatabase;
let runner: Runner | undefined;
beforeEach(async () => {
	opened = await openTestDatabase();
});
afterEach(async () => {
	await runner?.stop();
	runner = undefined;
	opened.close();
});

const put = (kind: string, payload: unknown = {}) =>
	write(opened.db, (tx) => enqueue(tx, { kind, payload, dedupeKey: kind, by: null }));

const rowOf = async (id: number) =>
	(await opened.db.select().from(job).where(eq(job.id, id)).limit(1))[0];

async function ended(id: number) {
	for (;;) {
		const row = await rowOf(id);
		if (row?.state === 'done' || row?.state === 'failed') return row;
		await new Promise((next) => setTimeout(next, 10));
	}
}

const handlers: Record<string, JobHandler> = {
	double: (_stores, payload, context) => {
		context.report({ done: 1, total: 2, words: 'doubles' });
		return Promise.resolve({ twice: Number(payload) * 2 });
	},
	refuse: () => Promise.reject(new RefusalError('The file has no lot column. Map one.')),
	break: () => Promise.reject(new TypeError('secret of the inside')),
	chain: async ({ db }) => {
		await write(db, (tx) =>
			enqueue(tx, { kind: 'double', payload: 21, dedupeKey: 'double', by: null })
		);
	}
};
const start = (place: JobPlace) =>
	(runner = startRunner({ db: opened.db, log: openLog('silent'), place }));
const stores = () => ({ db: opened.db, storage: unreachableStorage });

it('does what is queued, and keeps the result and the progress', async () => {
	const id = await put('double', 4);
	start(inlinePlace(stores(), handlers));
	expect(await ended(id)).toMatchObject({
		state: 'done',
		result: { twice: 8 },
		error: null,
		attempt: 1
	});
});

it('shows a refusal in its own words, and of a fault only that it was one', async () => {
	const [refused, broken, unknown] = [await put('refuse'), await put('break'), await put('odd')];
	start(inlinePlace(stores(), handlers));
	expect(await ended(refused)).toMatchObject({
		state: 'failed',
		error: 'The file has no lot column. Map one.'
	});
	expect(await ended(broken)).toMatchObject({ state: 'failed', error: jobFailed() });
	expect(await ended(unknown)).toMatchObject({ state: 'failed', error: jobFailed() });
});

it('puts a job back when its place dies over it, and does it at the next attempt', async () => {
	const id = await put('double', 3);
	const inline = inlinePlace(stores(), handlers);
	let deaths = 0;
	start({
		...inline,
		run: (claimed, report) => {
			deaths += 1;
			return deaths === 1 ? Promise.resolve(undefined) : inline.run(claimed, report);
		}
	});
	expect(await ended(id)).toMatchObject({ state: 'done', attempt: 2, result: { twice: 6 } });
});

it('breaks a running job off when it stops, and leaves it in the queue uncounted', async () => {
	const id = await put('double');
	let breakOff = () => {};
	const running = new Promise<void>((isRunning) => {
		start({
			run: () =>
				new Promise((answer) => {
					breakOff = () => answer(undefined);
					isRunning();
				}),
			breakOff: () => Promise.resolve(breakOff())
		});
	});
	await running;
	await runner?.stop();
	expect(await rowOf(id)).toMatchObject({ state: 'queued', attempt: 0, leaseUntil: null });
});

it('works a queue off in place, also what its jobs enqueue', async () => {
	await put('chain');
	await runOpenJobs(stores(), handlers);
	const rows = await opened.db.select({ kind: job.kind, state: job.state }).from(job);
	expect(rows).toEqual([
		{ kind: 'chain', state: 'done' },
		{ kind: 'double', state: 'done' }
	]);
});

it('ends a queue that is worked off in place at the first job that fails, with the reason', async () => {
	const id = await put('break');
	await expect(runOpenJobs(stores(), handlers)).rejects.toThrow(JobFailedError);
	expect(await rowOf(id)).toMatchObject({ state: 'failed', error: jobFailed() });
});
