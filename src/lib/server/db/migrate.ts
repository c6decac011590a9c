import { migrate } from 'drizzle-orm/libsql/migrator';
import type { Connection } from './database';

/** Applies the generated migrations that this database has not seen yet. */
export async function migrateDatabase(db: Connection, folder = 'drizzle'): Promise<void> {
	await migrate(db, { migrationsFolder: folder });
}
