import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import { openTestDatabase } from '../../../../tests/factories/testDatabase';
import type { OpenDatabase } from '../db/client';
import { person, session } from '../db/schema';
import { write } from '../db/write';
import { openSessions } from './sessions';
import type { Sessions } from './sessions';

let opened: OpenDatabase;
let sessions: Sessions;

beforeEach(async () => {
	opened = await openTestDatabase();
	sessions = openSessions(opened.db, false);
	await write(opened.db, (tx) =>
		tx.insert(person).values(
			['ida', 'tomas'].map((id) => ({
				id,
				email: `${id}@larkmoor.test`,
				name: id,
				passwordHash: '',
				createdAt: '2026-01-01T00:00:00.000Z'
			}))
		)
	);
});
afterEach(() => {
	vi.useRealTimers();
	opened.close();
});

const DAY = 86_400_000;
const rows = () => opened.db.select().from(session);

it('begins a session that is known again, and keeps its id out of the database', async () => {
	const { id } = await sessions.createSession('ida', {});
	const known = await sessions.validateSession(id);
	expect(known.session?.id).toBe(id);
	expect(known.user?.id).toBe('ida');

	const [row] = await rows();
	expect(row?.id).toMatch(/^[0-9a-f]{64}$/);
	expect(row?.id).not.toBe(id);
	expect((await sessions.validateSession(row?.id ?? '')).session).toBeNull();
});

it('lasts two weeks from the last use of its second half', async () => {
	const start = Date.now();
	vi.useFakeTimers({ toFake: ['Date'], now: start });
	const { id } = await sessions.createSession('ida', {});

	vi.setSystemTime(start + 6 * DAY);
	expect((await sessions.validateSession(id)).session?.fresh).toBe(false);
	vi.setSystemTime(start + 8 * DAY);
	expect((await sessions.validateSession(id)).session?.fresh).toBe(true);
	vi.setSystemTime(start + 21 * DAY);
	expect((await sessions.validateSession(id)).session?.fresh).toBe(true);
	vi.setSystemTime(start + 36 * DAY);
	expect((await sessions.validateSession(id)).session).toBeNull();
	expect(await rows()).toEqual([]);
});

it('ends one session, or every session of one person', async () => {
	const first = await sessions.createSession('ida', {});
	const second = await sessions.createSession('ida', {});
	const other = await sessions.createSession('tomas', {});

	await sessions.invalidateSession(first.id);
	expect((await sessions.validateSession(first.id)).session).toBeNull();
	expect((await sessions.validateSession(second.id)).session).not.toBeNull();

	await sessions.invalidateUserSessions('ida');
	expect((await sessions.validateSession(second.id)).session).toBeNull();
	expect((await sessions.validateSession(other.id)).session).not.toBeNull();
});

it.each([
	[true, 'Secure'],
	[false, '']
])('sets a cookie scripts cannot read, for this site only; over https %s', (isSecure, flag) => {
	const cookie = openSessions(opened.db, isSecure).createSessionCookie('x').serialize();
	expect(cookie).toMatch(/^platen_session=x;/);
	expect(cookie).toContain('HttpOnly');
	expect(cookie).toContain('SameSite=Lax');
	expect(cookie.includes('Secure')).toBe(flag === 'Secure');
});
