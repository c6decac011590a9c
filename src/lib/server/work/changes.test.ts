import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import { openTestDatabase } from '../../../../tests/factories/testDatabase';
import { appendAudit } from '../db/appendAudit';
import type { OpenDatabase } from '../db/client';
import { write } from '../db/write';
import { watchChanges } from './changes';
import type { Changes } from './changes';
import { claimJob, finishJob, prolongLease } from './claim';
import { enqueue } from './enqueue';

let opened: OpenDatabase;
let changes: Changes;
beforeEach(async () => {
	opened = await openTestDatabase();
	changes = watchChanges(opened.db);
});
afterEach(() => {
	changes.stop();
	opened.close();
});

const pause = (milliseconds: number) => new Promise((next) => setTimeout(next, milliseconds));
const audit = () =>
	write(opened.db, (tx) => appendAudit(tx, { action: 'test', subject: 'a thing', by: null }));

it('tells every listener of a commit once, and nobody of nothing', async () => {
	const [first, second] = [vi.fn(), vi.fn()];
	changes.listen(first, vi.fn());
	changes.listen(second, vi.fn());
	await pause(100);
	expect(first).not.toHaveBeenCalled();
	await audit();
	await vi.waitFor(() => expect(second).toHaveBeenCalledOnce(), { timeout: 5000 });
	await pause(900);
	expect(first).toHaveBeenCalledOnce();
	expect(second).toHaveBeenCalledOnce();
});

it('tells of a job that is put in, goes on, and ends', async () => {
	const heard = vi.fn();
	changes.listen(heard, vi.fn());
	await pause(100);
	const told = async (times: number) =>
		vi.waitFor(() => expect(heard).toHaveBeenCalledTimes(times), { timeout: 5000 });

	await write(opened.db, (tx) =>
		enqueue(tx, { kind: 'test', payload: {}, dedupeKey: 'a', by: null })
	);
	await told(1);
	const held = await claimJob(opened.db);
	if (held === undefined) throw new Error('nothing was claimed');
	await told(2);
	await prolongLease(opened.db, held, { done: 1, total: 2, words: 'half' });
	await told(3);
	await finishJob(opened.db, held, null);
	await told(4);
});

it('ends its listeners when it stops, and whoever comes later at once', async () => {
	const [end, late] = [vi.fn(), vi.fn()];
	changes.listen(vi.fn(), end);
	const stopListening = changes.listen(vi.fn(), late);
	stopListening();
	changes.stop();
	expect(end).toHaveBeenCalledOnce();
	expect(late).not.toHaveBeenCalled();
	changes.listen(vi.fn(), late);
	expect(late).toHaveBeenCalledOnce();
	await audit();
});
