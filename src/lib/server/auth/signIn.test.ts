import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { openTestDatabase } from '../../../../tests/factories/testDatabase';
import type { OpenDatabase } from '../db/client';
import { person } from '../db/schema';
import { write } from '../db/write';
import { hashPassword } from './passwords';
import { checkSignIn } from './signIn';
import { signInAttempts } from './signInAttempts';
import type { SignInAttempts } from './signInAttempts';

let opened: OpenDatabase;
let attempts: SignInAttempts;

beforeEach(async () => {
	opened = await openTestDatabase();
	attempts = signInAttempts();
	const passwordHash = await hashPassword('right');
	await write(opened.db, (tx) =>
		tx.insert(person).values({
			id: 'ida',
			email: 'ida@larkmoor.test',
			name: 'Ida Sandvik',
			passwordHash,
			createdAt: '2026-01-01T00:00:00.000Z'
		})
	);
});
afterEach(() => opened.close());

const signIn = (email: string, password: string, address = '192.0.2.1') =>
	checkSignIn(opened.db, attempts, { email, password, address });

it('knows a person by email and password, however the email is written', async () => {
	expect(await signIn('ida@larkmoor.test', 'right')).toEqual({ status: 'known', person: 'ida' });
	expect(await signIn(' Ida@Larkmoor.test ', 'right')).toEqual({ status: 'known', person: 'ida' });
});

it('answers an unknown person, a wrong password and a person who left alike', async () => {
	const refused = { status: 'refused' };
	expect(await signIn('ida@larkmoor.test', 'wrong')).toEqual(refused);
	expect(await signIn('nobody@larkmoor.test', 'right')).toEqual(refused);
	await write(opened.db, (tx) =>
		tx.update(person).set({ isActive: false }).where(eq(person.id, 'ida'))
	);
	expect(await signIn('ida@larkmoor.test', 'right')).toEqual(refused);
});

it('takes an unknown person as long as a wrong password', async () => {
	const timeOf = async (email: string) => {
		const times: number[] = [];
		for (let turn = 0; turn < 5; turn += 1) {
			const start = performance.now();
			await signIn(email, 'wrong');
			times.push(performance.now() - start);
		}
		return Math.min(...times);
	};
	await timeOf('warm@larkmoor.test');
	const known = await timeOf('ida@larkmoor.test');
	const unknown = await timeOf('nobody@larkmoor.test');
	// The hash is nearly all of it; without it an unknown person is answered a hundred times faster.
	expect(unknown).toBeGreaterThan(known / 3);
	expect(known).toBeGreaterThan(unknown / 3);
});

it('pauses a person after ten wrong passwords, from wherever they come, and nobody else', async () => {
	for (let turn = 0; turn < 10; turn += 1)
		expect(await signIn('ida@larkmoor.test', 'wrong', `192.0.2.${turn}`)).toEqual({
			status: 'refused'
		});
	expect(await signIn('ida@larkmoor.test', 'right', '192.0.2.99')).toEqual({ status: 'paused' });
	expect(await signIn('nobody@larkmoor.test', 'wrong', '192.0.2.99')).toEqual({
		status: 'refused'
	});
});

it('counts guesses that come all at once', async () => {
	const outcomes = await Promise.all(
		Array.from({ length: 14 }, () => signIn('ida@larkmoor.test', 'wrong'))
	);
	expect(outcomes.filter(({ status }) => status === 'refused')).toHaveLength(10);
	expect(outcomes.filter(({ status }) => status === 'paused')).toHaveLength(4);
});

it('pauses an address after fifty attempts on fifty people', async () => {
	// The limiter alone: fifty hashes would only warm the machine.
	for (let turn = 0; turn < 50; turn += 1) await attempts.byAddress.spend('192.0.2.7');
	expect(await signIn('ida@larkmoor.test', 'right', '192.0.2.7')).toEqual({ status: 'paused' });
	expect(await signIn('ida@larkmoor.test', 'right', '192.0.2.8')).toMatchObject({
		status: 'known'
	});
});

it('forgets the failures of a person who signs in, and gives the address its attempt back', async () => {
	for (let turn = 0; turn < 9; turn += 1) await attempts.byEmail.spend('ida@larkmoor.test');
	for (let turn = 0; turn < 49; turn += 1) await attempts.byAddress.spend('192.0.2.1');
	expect(await signIn('ida@larkmoor.test', 'right')).toMatchObject({ status: 'known' });
	expect(await signIn('ida@larkmoor.test', 'right')).toMatchObject({ status: 'known' });
});
