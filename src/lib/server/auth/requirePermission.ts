import { error, redirect } from '@sveltejs/kit';
import { mayNot, signInFirst } from '$lib/core/messages';
import { isPermitted } from '$lib/core/review/permissions';
import type { Permission } from '$lib/core/review/permissions';
import type { SignedIn } from './signedIn';

/** The part of a request's locals that says who is asking, and from where. */
export interface Asking {
	person: SignedIn | null;
	/** Whether the request is one of `/api/`. */
	isApi: boolean;
	/** Where a person who has to sign in first wanted to go. */
	path: string;
}

/**
 * The one gate of every load, action and endpoint.
 *
 * @throws a redirect to the sign-in page, or 401 for the API, when nobody is signed in
 * @throws 403 when none of the person's roles permits it
 */
export function requirePermission(locals: Asking, permission: Permission): SignedIn {
	if (locals.person === null) {
		if (locals.isApi) error(401, signInFirst());
		redirect(303, `/sign-in?to=${encodeURIComponent(locals.path)}`);
	}
	if (!isPermitted(locals.person.roles, permission)) error(403, mayNot(permission));
	return locals.person;
}
