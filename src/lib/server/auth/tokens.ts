import { createHash, randomBytes } from 'node:crypto';

/** A personal access token: 32 random bytes behind a prefix that secret scanners can find. */
export const newToken = (): string => `platen_${randomBytes(32).toString('base64url')}`;

/** What of a token is stored. It has 256 bits of its own, so one plain hash is enough. */
export const tokenHash = (token: string): string =>
	createHash('sha256').update(token).digest('hex');
