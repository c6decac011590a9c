import { createClient } from '@libsql/client';
import { drizzle } from 'drizzle-orm/libsql';
import type { Connection } from './database';
import * as schema from './schema';

/**
 * How long a statement may wait for a lock. The wait stalls the event loop, so it is short; `write`
 * waits longer, without stalling anything.
 */
const LOCK_TIMEOUT_MILLISECONDS = 15;

export interface OpenDatabase {
	readonly db: Connection;
	close(): void;
}

/** Opens the database at a libSQL address; foreign keys are on by the library's own default. */
export async function openDatabase(url: string): Promise<OpenDatabase> {
	const client = createClient({ url, timeout: LOCK_TIMEOUT_MILLISECONDS });
	if (url.startsWith('file:')) {
		await client.execute('PRAGMA journal_mode = WAL');
		await client.execute('PRAGMA synchronous = NORMAL');
	}
	return { db: drizzle(client, { schema }), close: () => client.close() };
}
