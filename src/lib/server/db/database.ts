import type { LibSQLDatabase } from 'drizzle-orm/libsql';
import type * as schema from './schema';

/** An open connection, as the process holds it. */
export type Connection = LibSQLDatabase<typeof schema>;

/** What a query asks: a connection and a transaction alike. */
export type Database = Pick<
	Connection,
	| 'select'
	| 'selectDistinct'
	| 'insert'
	| 'update'
	| 'delete'
	| 'query'
	| 'run'
	| 'all'
	| 'get'
	| 'values'
>;

/** An open transaction, as `write` hands it out. */
export type Transaction = Parameters<Parameters<Connection['transaction']>[0]>[0];
