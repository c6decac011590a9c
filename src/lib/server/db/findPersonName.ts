import { eq } from 'drizzle-orm';
import type { Database } from './database';
import { person } from './schema';

/**
 * What a person is called, to be kept beside what they decided.
 *
 * @throws {Error} for an id nobody has: whoever acts is signed in
 */
export async function findPersonName(db: Database, id: string): Promise<string> {
	const [found] = await db
		.select({ name: person.name })
		.from(person)
		.where(eq(person.id, id))
		.limit(1);
	if (found === undefined) throw new Error(`there is no person with id ${id}`);
	return found.name;
}
