import { and, eq, ne } from 'drizzle-orm';
import { lastAdministrator } from '$lib/core/messages/people';
import type { Role } from '$lib/core/review/permissions';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { person, personRole, session } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

export interface PersonChange {
	readonly person: string;
	readonly name: string;
	readonly roles: readonly Role[];
	readonly isActive: boolean;
	readonly by: string;
}

export type ChangePersonOutcome =
	| { readonly status: 'changed' }
	| { readonly status: 'absent' }
	| { readonly status: 'refused'; readonly message: string };

/** Changes a person's name, roles and right to sign in; who may no longer is signed out. */
export function changePerson(
	{ db }: Pick<Stores, 'db'>,
	{ person: id, name, roles, isActive, by }: PersonChange
): Promise<ChangePersonOutcome> {
	return write(db, async (tx) => {
		const staysAdministrator = isActive && roles.includes('administrator');
		if (!staysAdministrator && !(await isAnotherAdministrator(tx, id))) {
			return { status: 'refused', message: lastAdministrator() };
		}
		const [changed] = await tx
			.update(person)
			.set({ name, isActive })
			.where(eq(person.id, id))
			.returning({ id: person.id });
		if (changed === undefined) return { status: 'absent' };
		await tx.delete(personRole).where(eq(personRole.person, id));
		await tx.insert(personRole).values(roles.map((role) => ({ person: id, role })));
		if (!isActive) await tx.delete(session).where(eq(session.userId, id));
		await appendAudit(tx, {
			action: 'person.change',
			subject: name,
			by,
			details: { roles, isActive }
		});
		return { status: 'changed' };
	});
}

/** Whether somebody else is an active administrator. */
async function isAnotherAdministrator(db: Database, id: string): Promise<boolean> {
	const [other] = await db
		.select({ id: person.id })
		.from(personRole)
		.innerJoin(person, eq(person.id, personRole.person))
		.where(and(eq(personRole.role, 'administrator'), eq(person.isActive, true), ne(person.id, id)))
		.limit(1);
	return other !== undefined;
}
