import { and, desc, eq, isNull } from 'drizzle-orm';
import type { Database } from './database';
import { apiToken } from './schema';

/** A person's tokens that still give a right, newest first. */
export function listTokens(db: Database, person: string) {
	return db
		.select({ id: apiToken.id, name: apiToken.name, createdAt: apiToken.createdAt })
		.from(apiToken)
		.where(and(eq(apiToken.person, person), isNull(apiToken.revokedAt)))
		.orderBy(desc(apiToken.id));
}
