import { and, eq, isNull } from 'drizzle-orm';
import type { SQL } from 'drizzle-orm';
import type { Role } from '$lib/core/review/permissions';
import type { Database } from './database';
import { apiToken, person, personRole } from './schema';

interface Found {
	readonly id: string;
	readonly name: string;
	readonly email: string;
	readonly roles: readonly Role[];
}

async function findActive(db: Database, which: SQL): Promise<Found | undefined> {
	const [found] = await db
		.select({ id: person.id, name: person.name, email: person.email })
		.from(person)
		.where(and(which, eq(person.isActive, true)))
		.limit(1);
	if (found === undefined) return undefined;
	const roles = await db
		.select({ role: personRole.role })
		.from(personRole)
		.where(eq(personRole.person, found.id));
	return { ...found, roles: roles.map(({ role }) => role) };
}

/** The active person with this id and their roles, or `undefined`. */
export const findPersonById = (db: Database, id: string) => findActive(db, eq(person.id, id));

/** The active person with this email and their roles, or `undefined`. */
export const findPersonByEmail = (db: Database, email: string) =>
	findActive(db, eq(person.email, email.trim().toLowerCase()));

/** The active owner of the token with this hash, or `undefined` when it is unknown or revoked. */
export async function findPersonByTokenHash(db: Database, hash: string) {
	const [token] = await db
		.select({ id: apiToken.id, person: apiToken.person })
		.from(apiToken)
		.where(and(eq(apiToken.hash, hash), isNull(apiToken.revokedAt)))
		.limit(1);
	return token && findPersonById(db, token.person);
}
