import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { sql } from 'drizzle-orm';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { openDatabase } from './client';
import type { OpenDatabase } from './client';
import { findPendingMigrations } from './findPendingMigrations';
import { migrateDatabase } from './migrate';
import { personRole } from './schema';
import { write } from './write';

let folder: string;
let opened: OpenDatabase;

beforeEach(async () => {
	folder = mkdtempSync(join(tmpdir(), 'platen-client-'));
	opened = await openDatabase(`file:${join(folder, 'platen.db')}`);
});

afterEach(() => {
	opened.close();
	rmSync(folder, { recursive: true, force: true });
});

const pragma = async (name: string) => {
	const [row] = await opened.db.all<Record<string, unknown>>(sql.raw(`PRAGMA ${name}`));
	return Object.values(row ?? {})[0];
};

it('migrates an empty database once, and finds nothing to do afterwards', async () => {
	await expect(findPendingMigrations(opened.db)).rejects.toThrow();
	await migrateDatabase(opened.db);
	expect(await findPendingMigrations(opened.db)).toBe(0);
	await migrateDatabase(opened.db);
	expect(await findPendingMigrations(opened.db)).toBe(0);
	await opened.db.run(sql`delete from __drizzle_migrations`);
	expect(await findPendingMigrations(opened.db)).toBeGreaterThan(0);
});

it('writes ahead, and keeps foreign keys on in every connection of the pool', async () => {
	await migrateDatabase(opened.db);
	expect(await pragma('journal_mode')).toBe('wal');
	expect(await pragma('foreign_keys')).toBe(1);

	// An open transaction holds the first connection: this one is a second, opened just now.
	await write(opened.db, async (tx) => {
		const [inside] = await tx.all<{ foreign_keys: number }>(sql`PRAGMA foreign_keys`);
		expect(inside?.foreign_keys).toBe(1);
		expect(await pragma('foreign_keys')).toBe(1);
		expect(await pragma('busy_timeout')).toBe(15);
	});
	expect(await pragma('busy_timeout')).toBe(15);
});

it('refuses a row that refers to nobody', async () => {
	await migrateDatabase(opened.db);
	const orphan = write(opened.db, (tx) =>
		tx.insert(personRole).values({ person: 'nobody', role: 'reader' })
	);
	await expect(orphan).rejects.toMatchObject({
		cause: { message: expect.stringContaining('FOREIGN KEY') as string }
	});
	expect(await opened.db.select().from(personRole)).toEqual([]);
});
