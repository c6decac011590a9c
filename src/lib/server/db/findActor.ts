import { eq } from 'drizzle-orm';
import type { Actor } from '$lib/core/review/separation';
import type { Database } from './database';
import { personRole } from './schema';

/** A person with the roles they hold right now, for rules that go by person and role. */
export async function findActor(db: Database, id: string): Promise<Actor> {
	const roles = await db
		.select({ role: personRole.role })
		.from(personRole)
		.where(eq(personRole.person, id));
	return { id, roles: roles.map(({ role }) => role) };
}
