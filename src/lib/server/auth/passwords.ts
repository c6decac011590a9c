import { hash, verify } from '@node-rs/argon2';

/**
 * Argon2id (the package's default variant) with 19 MiB, two passes and one lane: the first
 * recommendation of the OWASP Password Storage Cheat Sheet, from memory.
 */
const COST = { memoryCost: 19_456, timeCost: 2, parallelism: 1, outputLen: 32 } as const;

/** A hash that no password has: it makes an unknown person cost what a known one costs. */
const NOBODYS = hash(crypto.randomUUID(), COST);

export const hashPassword = (password: string): Promise<string> => hash(password, COST);

/** Whether this is the password; takes the same time when there is nobody to compare with. */
export async function isPassword(stored: string | undefined, given: string): Promise<boolean> {
	const matches = await verify(stored ?? (await NOBODYS), given);
	return matches && stored !== undefined;
}
