import { asc, eq } from 'drizzle-orm';
import type { Role } from '$lib/core/review/permissions';
import type { Database } from './database';
import { person, personRole } from './schema';

export interface ListedPerson {
	readonly id: string;
	readonly name: string;
	readonly email: string;
	readonly isActive: boolean;
	readonly roles: readonly Role[];
}

/** Everybody, by name, with their roles. */
export async function listPeople(db: Database): Promise<ListedPerson[]> {
	const rows = await db
		.select({
			id: person.id,
			name: person.name,
			email: person.email,
			isActive: person.isActive,
			role: personRole.role
		})
		.from(person)
		.leftJoin(personRole, eq(personRole.person, person.id))
		.orderBy(asc(person.name));
	const people = new Map<string, ListedPerson>();
	for (const { role, ...rest } of rows) {
		const roles = people.get(rest.id)?.roles ?? [];
		people.set(rest.id, { ...rest, roles: role === null ? roles : [...roles, role] });
	}
	return [...people.values()];
}
