import { readMigrationFiles } from 'drizzle-orm/migrator';
import { sql } from 'drizzle-orm';
import type { Database } from './database';

/** How many of the generated migrations this database has not seen. */
export async function findPendingMigrations(db: Database, folder = 'drizzle'): Promise<number> {
	const known = readMigrationFiles({ migrationsFolder: folder });
	const [applied] = await db.all<{ newest: number | null }>(
		sql`select max(created_at) as newest from __drizzle_migrations`
	);
	return known.filter(({ folderMillis }) => folderMillis > Number(applied?.newest ?? 0)).length;
}
