import { redirect } from '@sveltejs/kit';
import { requirePermission } from '$lib/server/auth/requirePermission';
import type { RequestHandler } from './$types';

export const POST: RequestHandler = async ({ locals, cookies }) => {
	requirePermission(locals, 'account.manage');
	if (locals.sessionId !== null) await locals.sessions.invalidateSession(locals.sessionId);
	const { name, value, attributes } = locals.sessions.createBlankSessionCookie();
	cookies.set(name, value, { path: '/', ...attributes });
	redirect(303, '/sign-in');
};
