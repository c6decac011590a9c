import { createHash } from 'node:crypto';
import { DrizzleSQLiteAdapter } from '@lucia-auth/adapter-drizzle';
import { Lucia, TimeSpan } from 'lucia';
import type { Adapter } from 'lucia';
import type { Connection } from '../db/database';
import { person, session } from '../db/schema';
import { write } from '../db/write';

/** The database keeps a hash of the session's id, so that reading it gives nobody a session. */
const stored = (sessionId: string) => createHash('sha256').update(sessionId).digest('hex');

/** Lucia's own adapter, with every write through the one queue and no id in the clear. */
function sessionStore(db: Connection): Adapter {
	const reading = new DrizzleSQLiteAdapter(db, session, person);
	const writing = <Result>(work: (adapter: Adapter) => Promise<Result>) =>
		write(db, (tx) => work(new DrizzleSQLiteAdapter(tx, session, person)));
	return {
		async getSessionAndUser(id) {
			const [found, user] = await reading.getSessionAndUser(stored(id));
			return [found && { ...found, id }, user];
		},
		getUserSessions: (userId) => reading.getUserSessions(userId),
		setSession: (value) =>
			writing((adapter) => adapter.setSession({ ...value, id: stored(value.id) })),
		updateSessionExpiration: (id, expiresAt) =>
			writing((adapter) => adapter.updateSessionExpiration(stored(id), expiresAt)),
		deleteSession: (id) => writing((adapter) => adapter.deleteSession(stored(id))),
		deleteUserSessions: (userId) => writing((adapter) => adapter.deleteUserSessions(userId)),
		deleteExpiredSessions: () => writing((adapter) => adapter.deleteExpiredSessions())
	};
}

export type Sessions = Lucia;

/** Sessions of two weeks, renewed while they are used; the cookie is for this site only. */
export function openSessions(db: Connection, isSecure: boolean): Sessions {
	return new Lucia(sessionStore(db), {
		sessionExpiresIn: new TimeSpan(2, 'w'),
		sessionCookie: { name: 'platen_session', attributes: { secure: isSecure, sameSite: 'lax' } }
	});
}
