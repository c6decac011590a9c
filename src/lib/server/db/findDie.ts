import { eq } from 'drizzle-orm';
import { dieFacts } from '$lib/core/junction/dieFacts';
import type { Database } from './database';
import { die } from './schema';

export type FoundDie = NonNullable<Awaited<ReturnType<typeof findDie>>>;

/** The die with this id, or `undefined`. */
export async function findDie(db: Database, id: number) {
	const [found] = await db.select().from(die).where(eq(die.id, id)).limit(1);
	return found && { ...found, facts: dieFacts.parse(found.facts) };
}

/** The die with this name, however its letters are written; dies are few. */
export async function findDieByName(db: Database, name: string) {
	const named = await db.select({ id: die.id, name: die.name }).from(die);
	return named.find((other) => other.name.toLowerCase() === name.toLowerCase());
}
