import { expect, it } from 'vitest';
import { hashPassword, isPassword } from './passwords';

it('hashes by argon2id with the stated cost and a salt of its own each time', async () => {
	const [first, second] = await Promise.all([hashPassword('same'), hashPassword('same')]);
	// OWASP Password Storage Cheat Sheet, from memory: argon2id, m = 19 MiB, t = 2, p = 1.
	expect(first).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
	expect(first).not.toBe(second);
});

it('knows the password again, and no other', async () => {
	const stored = await hashPassword('correct horse');
	expect(await isPassword(stored, 'correct horse')).toBe(true);
	expect(await isPassword(stored, 'Correct horse')).toBe(false);
	expect(await isPassword(stored, '')).toBe(false);
});

it('lets nobody in who is not there', async () => {
	expect(await isPassword(undefined, 'anything')).toBe(false);
});
