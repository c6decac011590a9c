import type { Connection } from '../db/database';
import { findPersonByTokenHash } from '../db/findSignedIn';
import type { SignedIn } from './signedIn';
import { tokenHash } from './tokens';

const BEARER = /^Bearer +(\S+)$/i;

/** The owner of the token in an `Authorization` header, or `undefined` when it gives no right. */
export async function personOfToken(
	db: Connection,
	authorization: string
): Promise<SignedIn | undefined> {
	const token = BEARER.exec(authorization.trim())?.[1];
	return token === undefined ? undefined : findPersonByTokenHash(db, tokenHash(token));
}
