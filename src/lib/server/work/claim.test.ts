import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { jobGaveUp } from '$lib/core/messages';
import { openTestDatabase } from '../../../../tests/factories/testDatabase';
import type { OpenDatabase } from '../db/client';
import { job } from '../db/schema';
import { write } from '../db/write';
import {
	claimJob,
	failJob,
	finishJob,
	isCurrentAttempt,
	LEASE_MILLISECONDS,
	prolongLease,
	releaseJob
} from './claim';
import { enqueue } from './enqueue';

let opened: OpenDatabase;
beforeEach(async () => {
	opened = await openTestDatabase();
});
afterEach(() => opened.close());

const put = (dedupeKey: string, payload: unknown = {}) =>
	write(opened.db, (tx) => enqueue(tx, { kind: 'test', payload, dedupeKey, by: null }));

const rowOf = async (id: number) =>
	(await opened.db.select().from(job).where(eq(job.id, id)).limit(1))[0];

/** As if the process that holds the job had died half a minute ago. */
const letLeaseRunOut = (id: number) =>
	write(opened.db, (tx) =>
		tx.update(job).set({ leaseUntil: '2020-01-01T00:00:00.000Z' }).where(eq(job.id, id))
	);

async function claimed() {
	const found = await claimJob(opened.db);
	if (found === undefined) throw new Error('nothing was claimed');
	return found;
}

it('lets an open job with the same key stand for a new one, and not one that has ended', async () => {
	const first = await put('import 7');
	expect(await put('import 7')).toBe(first);
	const held = await claimed();
	expect(await put('import 7')).toBe(first);
	await finishJob(opened.db, held, null);
	expect(await put('import 7')).not.toBe(first);
});

it('hands out the oldest job first, each to one taker, under a lease', async () => {
	const [first, second] = [await put('a', { from: 1 }), await put('b')];
	const before = Date.now();
	const taken = await Promise.all([claimed(), claimed()]);
	expect(taken.map(({ id }) => id)).toEqual([first, second]);
	expect(taken[0]).toMatchObject({ kind: 'test', payload: { from: 1 }, attempt: 1 });
	expect(await claimJob(opened.db)).toBeUndefined();

	const until = Date.parse((await rowOf(first))?.leaseUntil ?? '');
	expect(until - before).toBeGreaterThanOrEqual(LEASE_MILLISECONDS);
});

it('hands a job out again once its lease has run out, and fences the old attempt off', async () => {
	const id = await put('a');
	const old = await claimed();
	await letLeaseRunOut(id);
	const current = await claimed();
	expect(current).toMatchObject({ id, attempt: 2 });

	expect(await isCurrentAttempt(opened.db, old)).toBe(false);
	expect(await prolongLease(opened.db, old)).toBe(false);
	expect(await finishJob(opened.db, old, 'late')).toBe(false);
	expect(await failJob(opened.db, old, 'late')).toBe(false);
	expect(await releaseJob(opened.db, old, { isCounted: true })).toBe(false);
	expect(await rowOf(id)).toMatchObject({ state: 'running', attempt: 2, result: null });

	expect(await isCurrentAttempt(opened.db, current)).toBe(true);
	expect(await finishJob(opened.db, current, { rows: 3 })).toBe(true);
	expect(await rowOf(id)).toMatchObject({ state: 'done', result: { rows: 3 }, leaseUntil: null });
});

it('keeps a job whose lease is prolonged in time', async () => {
	const id = await put('a');
	const held = await claimed();
	await letLeaseRunOut(id);
	expect(await prolongLease(opened.db, held, { done: 1, total: 4, words: 'reads' })).toBe(true);
	expect(await claimJob(opened.db)).toBeUndefined();
	expect(await rowOf(id)).toMatchObject({ progress: { done: 1, total: 4, words: 'reads' } });
});

it('gives a job up after three attempts, says so, and goes on with the next', async () => {
	const poison = await put('poison');
	for (let attempt = 1; attempt <= 3; attempt += 1) {
		expect(await claimed()).toMatchObject({ id: poison, attempt });
		await letLeaseRunOut(poison);
	}
	const next = await put('next');
	expect(await claimed()).toMatchObject({ id: next, attempt: 1 });
	expect(await rowOf(poison)).toMatchObject({ state: 'failed', error: jobGaveUp(3) });
});

it('does not count an attempt that ended because its process ended in order', async () => {
	const id = await put('a');
	for (let turn = 0; turn < 5; turn += 1) {
		const held = await claimed();
		expect(held.attempt).toBe(1);
		await releaseJob(opened.db, held, { isCounted: false });
	}
	await releaseJob(opened.db, await claimed(), { isCounted: true });
	expect(await rowOf(id)).toMatchObject({ state: 'queued', attempt: 1, leaseUntil: null });
	expect((await claimed()).attempt).toBe(2);
});
