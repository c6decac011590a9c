import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { openDatabase, type OpenDatabase } from '$lib/server/db/client';
import { migrateDatabase } from '$lib/server/db/migrate';

/** A migrated database in a folder of its own; `close` removes it. A file, since `:memory:` is one connection. */
export async function openTestDatabase(): Promise<OpenDatabase> {
	const folder = mkdtempSync(join(tmpdir(), 'platen-test-'));
	const opened = await openDatabase(`file:${join(folder, 'platen.db')}`);
	await migrateDatabase(opened.db);
	return {
		db: opened.db,
		close() {
			opened.close();
			rmSync(folder, { recursive: true, force: true });
		}
	};
}
