import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { asc, eq } from 'drizzle-orm';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { openTestDatabase } from '../../../../tests/factories/testDatabase';
import { keepAuditHead, readAuditHead } from '../auditHead';
import { appendAudit, auditHash, CHAIN_START } from './appendAudit';
import type { OpenDatabase } from './client';
import { audit } from './schema';
import { verifyAuditChain } from './verifyAuditChain';
import { write } from './write';

let opened: OpenDatabase;
let folder: string;
beforeEach(async () => {
	folder = mkdtempSync(join(tmpdir(), 'platen-audit-'));
	opened = await openTestDatabase();
	for (const number of [1, 2, 3, 4]) await append(number);
});
afterEach(() => {
	opened.close();
	rmSync(folder, { recursive: true, force: true });
});

const append = (number: number) =>
	write(opened.db, (tx) =>
		appendAudit(tx, {
			action: 'revision.submit',
			subject: `LKT-1130 revision ${number}`,
			by: null,
			details: { number, by: 'µ' }
		})
	);
const rows = () => opened.db.select().from(audit).orderBy(asc(audit.seq));
const verify = async () => verifyAuditChain(opened.db, await readAuditHead(folder));

it('links each row to the one before, from the start on', async () => {
	const found = await rows();
	expect(found.map(({ seq }) => seq)).toEqual([1, 2, 3, 4]);
	expect(found[0]?.prevHash).toBe(CHAIN_START);
	expect(found[2]?.prevHash).toBe(found[1]?.hash);
	expect(await verify()).toMatchObject({ status: 'whole', rows: 4 });
});

it('is undone with the transaction it stands in', async () => {
	const failing = write(opened.db, async (tx) => {
		await appendAudit(tx, { action: 'x', subject: 'y', by: null });
		throw new Error('no');
	});
	await expect(failing).rejects.toThrow('no');
	expect(await rows()).toHaveLength(4);
});

it.each(['action', 'subject', 'at'] as const)(
	'shows a row whose %s was changed',
	async (column) => {
		await write(opened.db, (tx) =>
			tx
				.update(audit)
				.set({ [column]: 'other' })
				.where(eq(audit.seq, 2))
		);
		expect(await verify()).toEqual({ status: 'broken', seq: 2 });
	}
);

it('shows details that were changed, and a row that was taken out between others', async () => {
	await write(opened.db, (tx) =>
		tx
			.update(audit)
			.set({ details: { number: 30 } })
			.where(eq(audit.seq, 3))
	);
	expect(await verify()).toEqual({ status: 'broken', seq: 3 });
	await write(opened.db, (tx) => tx.delete(audit).where(eq(audit.seq, 3)));
	expect(await verify()).toEqual({ status: 'broken', seq: 4 });
});

it('shows by the head kept outside that the newest row was taken away, later rows or not', async () => {
	await keepAuditHead(opened.db, folder);
	expect((await readAuditHead(folder))?.seq).toBe(4);
	await write(opened.db, (tx) => tx.delete(audit).where(eq(audit.seq, 4)));
	expect(await verify()).toEqual({ status: 'broken', seq: 4 });

	await append(5);
	await keepAuditHead(opened.db, folder);
	expect(await readAuditHead(folder)).toMatchObject({ seq: 4 });
	expect(await verify()).toMatchObject({ status: 'broken' });
});

it('shows a chain that was written anew from its start', async () => {
	await keepAuditHead(opened.db, folder);
	await write(opened.db, async (tx) => {
		const old = await tx.select().from(audit).orderBy(asc(audit.seq));
		await tx.delete(audit);
		let prevHash = CHAIN_START;
		for (const row of old) {
			const next = { ...row, subject: 'somebody else’s', prevHash };
			const hash = auditHash(prevHash, next);
			await tx.insert(audit).values({ ...next, hash });
			prevHash = hash;
		}
	});
	expect(await verifyAuditChain(opened.db)).toMatchObject({ status: 'whole' });
	expect(await verify()).toEqual({ status: 'broken', seq: 4 });
});

it('moves the head on with new rows, and never back', async () => {
	await keepAuditHead(opened.db, folder);
	await append(5);
	await keepAuditHead(opened.db, folder);
	const head = await readAuditHead(folder);
	expect(head).toMatchObject({ seq: 5, hash: (await rows()).at(-1)?.hash });
	expect(await verify()).toMatchObject({ status: 'whole', rows: 5 });
});
