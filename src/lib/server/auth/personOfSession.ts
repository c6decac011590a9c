import type { RequestEvent } from '@sveltejs/kit';
import { findPersonById } from '../db/findSignedIn';
import type { Sessions } from './sessions';

/** Reads the session cookie into the request's locals; renews or drops the cookie as lucia says. */
export async function personOfSession(
	sessions: Sessions,
	event: Pick<RequestEvent, 'cookies' | 'locals'>
): Promise<void> {
	const sessionId = event.cookies.get(sessions.sessionCookieName);
	if (sessionId === undefined) return;

	const { session, user } = await sessions.validateSession(sessionId);
	const person = user === null ? undefined : await findPersonById(event.locals.db, user.id);
	if (session === null || person === undefined) {
		const blank = sessions.createBlankSessionCookie();
		event.cookies.set(blank.name, blank.value, { path: '/', ...blank.attributes });
		return;
	}
	if (session.fresh) {
		const cookie = sessions.createSessionCookie(session.id);
		event.cookies.set(cookie.name, cookie.value, { path: '/', ...cookie.attributes });
	}
	event.locals.person = person;
	event.locals.sessionId = session.id;
}
