import { asc, eq } from 'drizzle-orm';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { emailTaken, lastAdministrator } from '$lib/core/messages/people';
import type { Role } from '$lib/core/review/permissions';
import { openTestDatabase } from '../../../../tests/factories/testDatabase';
import { openSessions } from '../auth/sessions';
import { personOfToken } from '../auth/personOfToken';
import { tokenHash } from '../auth/tokens';
import type { OpenDatabase } from '../db/client';
import { findPersonByEmail, findPersonById } from '../db/findSignedIn';
import { listTokens } from '../db/listTokens';
import { apiToken, audit, session } from '../db/schema';
import { addPerson } from './addPerson';
import { changePerson } from './changePerson';
import { createToken } from './createToken';
import { revokeToken } from './revokeToken';

let opened: OpenDatabase;
beforeEach(async () => {
	opened = await openTestDatabase();
});
afterEach(() => opened.close());

const PASSWORD = 'long enough for a test';

async function add(name: string, ...roles: Role[]): Promise<string> {
	const email = `${name.toLowerCase()}@larkmoor.test`;
	const outcome = await addPerson(opened, { name, email, roles, password: PASSWORD, by: null });
	if (outcome.status === 'refused') throw new Error(outcome.message);
	return outcome.person;
}
const change = (person: string, roles: readonly Role[], isActive = true) =>
	changePerson(opened, { person, name: 'Changed', roles, isActive, by: person });
const actions = async () =>
	(await opened.db.select({ action: audit.action }).from(audit).orderBy(asc(audit.seq))).map(
		({ action }) => action
	);

it('adds a person with several roles, and writes it into the audit trail without the password', async () => {
	const id = await add('Ida', 'product_engineer', 'marketing');
	const found = await findPersonByEmail(opened.db, ' IDA@larkmoor.test');
	expect(found).toMatchObject({ id, name: 'Ida' });
	expect(found?.roles.toSorted()).toEqual(['marketing', 'product_engineer']);
	expect(await actions()).toEqual(['person.add']);
	expect(JSON.stringify(await opened.db.select().from(audit))).not.toContain(PASSWORD);
});

it('refuses an email that is taken', async () => {
	await add('Ida', 'reader');
	const email = 'ida@larkmoor.test';
	expect(
		await addPerson(opened, { name: 'B', email, roles: ['reader'], password: PASSWORD, by: null })
	).toEqual({ status: 'refused', message: emailTaken(email) });
	expect(await actions()).toEqual(['person.add']);
});

it('changes name and roles, and writes it into the audit trail', async () => {
	await add('Per', 'administrator');
	const ida = await add('Ida', 'reader');
	expect(await change(ida, ['product_engineer'])).toEqual({ status: 'changed' });
	expect(await findPersonById(opened.db, ida)).toMatchObject({
		name: 'Changed',
		roles: ['product_engineer']
	});
	expect((await actions()).at(-1)).toBe('person.change');
});

it('changes nobody who is not there', async () => {
	await add('Per', 'administrator');
	expect(await change('nobody', ['reader'])).toEqual({ status: 'absent' });
	expect(await actions()).toEqual(['person.add']);
});

it.each<[string, readonly Role[], boolean]>([
	['the role', ['reader'], true],
	['the right to sign in', ['administrator'], false]
])('leaves the last administrator %s', async (_what, roles, isActive) => {
	const per = await add('Per', 'administrator');
	const left = await add('Left', 'administrator');
	expect(await change(left, ['administrator'], false)).toEqual({ status: 'changed' });
	expect(await change(per, roles, isActive)).toEqual({
		status: 'refused',
		message: lastAdministrator()
	});
	expect(await findPersonById(opened.db, per)).toMatchObject({ roles: ['administrator'] });

	await add('Next', 'administrator');
	expect(await change(per, roles, isActive)).toEqual({ status: 'changed' });
});

it('ends the sessions and the tokens of a person who may no longer sign in', async () => {
	await add('Per', 'administrator');
	const ida = await add('Ida', 'reader');
	const sessions = openSessions(opened.db, false);
	const { id } = await sessions.createSession(ida, {});
	const token = await createToken(opened, { person: ida, name: 'script' });
	expect(await personOfToken(opened.db, `Bearer ${token}`)).toMatchObject({ id: ida });

	await change(ida, ['reader'], false);
	expect(await opened.db.select().from(session)).toEqual([]);
	expect((await sessions.validateSession(id)).session).toBeNull();
	expect(await personOfToken(opened.db, `Bearer ${token}`)).toBeUndefined();
	expect(await findPersonById(opened.db, ida)).toBeUndefined();
});

it('keeps only the hash of a token, and gives it no right once it is revoked', async () => {
	const ida = await add('Ida', 'reader');
	const tomas = await add('Tomas', 'reader');
	const token = await createToken(opened, { person: ida, name: 'script' });
	expect(token).toMatch(/^platen_[\w-]{43}$/);
	const [row] = await opened.db.select().from(apiToken).where(eq(apiToken.person, ida));
	expect(row?.hash).toBe(tokenHash(token));
	expect(JSON.stringify([row, await opened.db.select().from(audit)])).not.toContain(token);

	const id = row?.id ?? 0;
	expect(await revokeToken(opened, { token: id, by: tomas })).toBe(false);
	expect(await personOfToken(opened.db, `Bearer ${token}`)).toMatchObject({ id: ida });
	expect(await revokeToken(opened, { token: id, by: ida })).toBe(true);
	expect(await revokeToken(opened, { token: id, by: ida })).toBe(false);
	expect(await personOfToken(opened.db, `Bearer ${token}`)).toBeUndefined();
	expect(await listTokens(opened.db, ida)).toEqual([]);
});
