import { asc } from 'drizzle-orm';
import type { Database } from './database';
import { die } from './schema';

/** Ids and names of the dies, by name: what a product can be made of. */
export function listDieNames(db: Database) {
	return db.select({ id: die.id, name: die.name }).from(die).orderBy(asc(die.name));
}
