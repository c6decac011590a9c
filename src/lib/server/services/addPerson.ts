import { randomUUID } from 'node:crypto';
import { eq } from 'drizzle-orm';
import { emailTaken } from '$lib/core/messages/people';
import type { Role } from '$lib/core/review/permissions';
import { hashPassword } from '../auth/passwords';
import { appendAudit } from '../db/appendAudit';
import { person, personRole } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

export interface NewPerson {
	readonly name: string;
	readonly email: string;
	readonly roles: readonly Role[];
	readonly password: string;
	/** The administrator; `null` for the first people of an installation. */
	readonly by: string | null;
}

export type AddPersonOutcome =
	| { readonly status: 'added'; readonly person: string }
	| { readonly status: 'refused'; readonly message: string };

/** Adds somebody who can sign in from now on. */
export async function addPerson(
	{ db }: Pick<Stores, 'db'>,
	{ name, email, roles, password, by }: NewPerson
): Promise<AddPersonOutcome> {
	const at = new Date().toISOString();
	const passwordHash = await hashPassword(password);
	return write(db, async (tx) => {
		const [taken] = await tx.select({ id: person.id }).from(person).where(eq(person.email, email));
		if (taken !== undefined) return { status: 'refused', message: emailTaken(email) };

		const id = randomUUID();
		await tx.insert(person).values({ id, name, email, passwordHash, createdAt: at });
		await tx.insert(personRole).values(roles.map((role) => ({ person: id, role })));
		await appendAudit(tx, { action: 'person.add', subject: name, by, details: { email, roles } });
		return { status: 'added', person: id };
	});
}
