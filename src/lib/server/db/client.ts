import { createClient } from '@libsql/client';
import type { Client } from '@libsql/client';
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
	readonly close: () => void;
}

/**
 * Opens the database at a libSQL address. Every connection of the pool has foreign keys on, and
 * commits reach the disk before they return, by the library's own defaults.
 */
export async function openDatabase(url: string): Promise<OpenDatabase> {
	const client = createClient({ url, timeout: LOCK_TIMEOUT_MILLISECONDS });
	if (url.startsWith('file:')) {
		await client.execute('PRAGMA journal_mode = WAL');
		beginCleanly(client);
	}
	return { db: drizzle(client, { schema }), close: () => client.close() };
}

/**
 * Lets a transaction that is refused for a lock leave its connection usable. The client runs BEGIN
 * IMMEDIATE as a prepared statement, and one that ends with SQLITE_BUSY stays open until it is
 * collected as garbage; until then every COMMIT of that connection fails with "cannot commit
 * transaction - SQL statements in progress". A script of statements is finalized at once, so the
 * lock is taken by one.
 */
function beginCleanly(client: Client): void {
	const begin = client.transaction.bind(client);
	client.transaction = async () => {
		const transaction = await begin('deferred');
		try {
			await transaction.executeMultiple('ROLLBACK; BEGIN IMMEDIATE');
			return transaction;
		} catch (problem) {
			transaction.close();
			throw problem;
		}
	};
}
