import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { openDatabase } from './client';
import type { OpenDatabase } from './client';
import { migrateDatabase } from './migrate';
import { job } from './schema';
import { write } from './write';

let folder: string;
let url: string;
let first: OpenDatabase;
let second: OpenDatabase;

beforeEach(async () => {
	folder = mkdtempSync(join(tmpdir(), 'platen-write-'));
	url = `file:${join(folder, 'platen.db')}`;
	first = await openDatabase(url);
	second = await openDatabase(url);
	await migrateDatabase(first.db);
	await write(first.db, (tx) => tx.insert(job).values(counter));
});

afterEach(() => {
	first.close();
	second.close();
	rmSync(folder, { recursive: true, force: true });
});

const counter = {
	id: 1,
	kind: 'counter',
	payload: {},
	dedupeKey: 'counter',
	state: 'queued',
	createdAt: '2026-01-01T00:00:00.000Z'
} as const;

const pause = (milliseconds: number) => new Promise((next) => setTimeout(next, milliseconds));

const count = async ({ db }: OpenDatabase) =>
	(await db.select({ attempt: job.attempt }).from(job).where(eq(job.id, 1)))[0]?.attempt;

/** Reads, waits and writes: a lost update unless the transaction held the lock from its start. */
const addOne = ({ db }: OpenDatabase) =>
	write(db, async (tx) => {
		const [found] = await tx.select({ attempt: job.attempt }).from(job).where(eq(job.id, 1));
		await pause(1);
		await tx
			.update(job)
			.set({ attempt: (found?.attempt ?? 0) + 1 })
			.where(eq(job.id, 1));
	});

it('loses no update when two connections write the same row by turns', async () => {
	await Promise.all(
		Array.from({ length: 40 }, (_, turn) => addOne(turn % 2 === 0 ? first : second))
	);
	expect(await count(first)).toBe(40);
	expect(await count(second)).toBe(40);
});

it('undoes everything when the work throws, and writes on afterwards', async () => {
	const failing = write(first.db, async (tx) => {
		await tx.update(job).set({ attempt: 99 }).where(eq(job.id, 1));
		throw new Error('no');
	});
	await expect(failing).rejects.toThrow('no');
	expect(await count(first)).toBe(0);
	await addOne(first);
	expect(await count(first)).toBe(1);
});

it('lets readers of the same connection see what was committed while a write is open', async () => {
	let release = () => {};
	const held = new Promise<void>((next) => (release = next));
	const writing = write(first.db, async (tx) => {
		await tx.update(job).set({ attempt: 7 }).where(eq(job.id, 1));
		await held;
	});
	await pause(5);
	expect(await count(first)).toBe(0);
	release();
	await writing;
	expect(await count(first)).toBe(7);
});

/** Holds the write lock in a process of its own, as a sibling server would. */
async function holdLock(milliseconds: number) {
	const program = `
		import { createClient } from '@libsql/client';
		const client = createClient({ url: ${JSON.stringify(url)} });
		const tx = await client.transaction('write');
		await tx.execute('update job set attempt = attempt + 100 where id = 1');
		console.log('held');
		setTimeout(async () => { await tx.commit(); client.close(); }, ${milliseconds});`;
	const holder = spawn(process.execPath, ['--input-type=module', '--eval', program], {
		stdio: ['ignore', 'pipe', 'inherit']
	});
	await once(holder.stdout, 'data');
	return holder;
}

it('waits for another process without stalling the event loop', async () => {
	const holder = await holdLock(1000);
	let longest = 0;
	let before = performance.now();
	const beat = setInterval(() => {
		const now = performance.now();
		longest = Math.max(longest, now - before);
		before = now;
	}, 2);
	const start = performance.now();
	await addOne(first);
	const waited = performance.now() - start;
	clearInterval(beat);
	await (holder.exitCode === null ? once(holder, 'exit') : undefined);

	expect(await count(first)).toBe(101);
	expect(waited).toBeGreaterThan(300);
	expect(waited).toBeLessThan(3000);
	// A statement waits 15 ms for the lock at most; a stall of the whole wait would be a second.
	expect(longest).toBeLessThan(400);
});

it('does not begin its work before another connection has ended its own', async () => {
	let release = () => {};
	const held = new Promise<void>((next) => (release = next));
	const order: string[] = [];
	const writing = write(first.db, async () => {
		await held;
		order.push('first ends');
	});
	await pause(5);
	const waiting = write(second.db, async (tx) => {
		order.push('second begins');
		await tx.update(job).set({ attempt: 5 }).where(eq(job.id, 1));
	});
	await pause(80);
	release();
	await Promise.all([writing, waiting]);
	expect(order).toEqual(['first ends', 'second begins']);
	expect(await count(first)).toBe(5);
});

// libsql keeps a prepared BEGIN that was refused open until it is garbage: every COMMIT of that
// connection failed meanwhile, and writes took seconds after the lock was free.
it('commits at once after it was refused the lock many times', async () => {
	for (let turn = 1; turn <= 10; turn += 1) {
		let release = () => {};
		const held = new Promise<void>((next) => (release = next));
		const writing = write(first.db, () => held);
		await pause(5);
		const waiting = addOne(second);
		await pause(60);
		release();
		await writing;
		const freed = performance.now();
		await waiting;
		expect(performance.now() - freed).toBeLessThan(400);
		expect(await count(first)).toBe(turn);
	}
});

it('refuses a write inside a write at once instead of waiting for itself', async () => {
	const nested = write(first.db, () => write(first.db, () => Promise.resolve(1)));
	await expect(nested).rejects.toThrow('a write was begun inside a write');
	await addOne(first);
	expect(await count(first)).toBe(1);
});
