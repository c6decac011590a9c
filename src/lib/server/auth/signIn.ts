import { eq } from 'drizzle-orm';
import type { Connection } from '../db/database';
import { person } from '../db/schema';
import type { Attempts } from './attempts';
import { isPassword } from './passwords';

export type SignInOutcome =
	| { readonly status: 'known'; readonly person: string }
	| { readonly status: 'refused' }
	| { readonly status: 'paused' };

export interface SignInInput {
	readonly email: string;
	readonly password: string;
	readonly address: string;
}

/**
 * Who this email and password belong to. An unknown person, a wrong password and a person who may
 * no longer sign in get the same answer after the same work.
 */
export async function checkSignIn(
	db: Connection,
	attempts: Attempts,
	{ email, password, address }: SignInInput
): Promise<SignInOutcome> {
	const wanted = email.trim().toLowerCase();
	const keys = [`email ${wanted}`, `address ${address}`];
	if ((await Promise.all(keys.map((key) => attempts.isSpent(key)))).includes(true)) {
		return { status: 'paused' };
	}
	const [found] = await db.select().from(person).where(eq(person.email, wanted)).limit(1);
	const matches = await isPassword(found?.passwordHash, password);
	if (!matches || !found?.isActive) {
		await Promise.all(keys.map((key) => attempts.spend(key)));
		return { status: 'refused' };
	}
	await attempts.forgive(`email ${wanted}`);
	return { status: 'known', person: found.id };
}
