import { PERMISSIONS, ROLE_NAMES } from './review/permissions';
import type { Permission } from './review/permissions';

/*
 * Sentences that belong to no one part. Those of a part stand in messages/ under its name.
 */

export const signInFirst = () => 'Sign in first.';

export const mayNot = (permission: Permission) => {
	const roles = PERMISSIONS[permission].map((role) => ROLE_NAMES[role]);
	return `This needs the role ${roles.join(' or ')}. An administrator can give it to you.`;
};

export const wrongOrigin = () =>
	'The request did not come from this address. Open the page again and repeat it; nothing was changed.';

export const bodyTooLarge = (limit: number) =>
	`The request is larger than ${limit / 1e6} MB, the most that is taken here.`;

export const bodyLengthNeeded = () => 'Say how long the request is, with Content-Length.';

export const badToken = () =>
	'The access token is unknown, revoked, or its owner can no longer sign in.';

export const notFound = () => 'There is nothing at this address.';

export const ourFault = (requestId: string) =>
	`Something went wrong here, and nothing was changed. The request was ${requestId}.`;

export const tooManyAttempts = () =>
	'Too many attempts from here. Wait a few minutes and try again.';

export const jobGaveUp = (attempts: number) =>
	`This was tried ${attempts} times and never came to its end. What was uploaded is kept.`;

export const jobFailed = () =>
	'This failed by a fault of the program. What was uploaded is kept; the log of the server has the details.';
