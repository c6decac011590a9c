import { eq } from 'drizzle-orm';
import type { Connection } from '../db/database';
import { person } from '../db/schema';
import { isPassword } from './passwords';
import type { SignInAttempts } from './signInAttempts';

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
	{ byEmail, byAddress }: SignInAttempts,
	{ email, password, address }: SignInInput
): Promise<SignInOutcome> {
	const wanted = email.trim().toLowerCase();
	// Spent before the password is looked at: a hundred guesses at once are a hundred guesses.
	const isLeft = await Promise.all([byEmail.spend(wanted), byAddress.spend(address)]);
	if (isLeft.includes(false)) return { status: 'paused' };

	const [found] = await db.select().from(person).where(eq(person.email, wanted)).limit(1);
	const isRight = await isPassword(found?.passwordHash, password);
	if (!isRight || !found?.isActive) return { status: 'refused' };

	await Promise.all([byEmail.forgive(wanted), byAddress.giveBack(address)]);
	return { status: 'known', person: found.id };
}
