import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Role } from '$lib/core/review/permissions';
import { ROLES } from '$lib/core/review/permissions';
import { openSessions } from '$lib/server/auth/sessions';
import type { Sessions } from '$lib/server/auth/sessions';
import { openDatabase } from '$lib/server/db/client';
import type { Connection } from '$lib/server/db/database';
import { migrateDatabase } from '$lib/server/db/migrate';
import { addPerson } from '$lib/server/services/addPerson';
import { createToken } from '$lib/server/services/createToken';

/** The address people use; the server listens elsewhere, as behind a proxy. */
export const ORIGIN = 'http://platen.test';
export const PASSWORD = 'a password of the tests';

export interface Somebody {
	readonly id: string;
	readonly email: string;
	readonly token: string;
}

export interface ServedApplication {
	/** Where the server listens. */
	readonly url: string;
	readonly db: Connection;
	readonly dataDir: string;
	/** One person a role. */
	readonly people: Readonly<Record<Role, Somebody>>;
	readonly process: ChildProcess;
	/** What the server wrote to its standard output so far. */
	readonly log: () => string;
	/** The `Cookie` header of a new session of this person. */
	cookieOf(person: Somebody): Promise<string>;
	/** Ends the server as a process manager does, and answers its exit code. */
	stop(): Promise<number | null>;
}

/** Starts the built server on a port of its own, on a new data folder with one person a role. */
export async function serveApplication(
	env: Readonly<Record<string, string>> = {}
): Promise<ServedApplication> {
	const dataDir = mkdtempSync(join(tmpdir(), 'platen-served-'));
	const { db, close } = await openDatabase(pathToFileURL(join(dataDir, 'platen.db')).href);
	await migrateDatabase(db);
	const people = await addPeople(db);
	const sessions = openSessions(db, false);
	const { child, url, log } = await startServer({ DATA_DIR: dataDir, ORIGIN, ...env });
	return {
		url,
		db,
		dataDir,
		people,
		process: child,
		log,
		cookieOf: (person) => cookieOf(sessions, person),
		async stop() {
			const code = await endServer(child);
			close();
			rmSync(dataDir, { recursive: true, force: true });
			return code;
		}
	};
}

async function addPeople(db: Connection): Promise<Record<Role, Somebody>> {
	const added = await Promise.all(
		ROLES.map(async (role) => {
			const email = `${role}@larkmoor.test`;
			const outcome = await addPerson(
				{ db },
				{ name: role, email, roles: [role], password: PASSWORD, by: null }
			);
			if (outcome.status === 'refused') throw new Error(outcome.message);
			const token = await createToken({ db }, { person: outcome.person, name: 'tests' });
			return [role, { id: outcome.person, email, token }] as const;
		})
	);
	return Object.fromEntries(added) as Record<Role, Somebody>;
}

async function cookieOf(sessions: Sessions, person: Somebody): Promise<string> {
	const { id } = await sessions.createSession(person.id, {});
	return `${sessions.sessionCookieName}=${id}`;
}

/** Runs `node build` with this environment, and waits until it says where it listens. */
export async function startServer(env: Readonly<Record<string, string>>) {
	const child = spawn(process.execPath, ['build'], {
		env: { PATH: process.env.PATH, HOST: '127.0.0.1', PORT: '0', NODE_ENV: 'production', ...env },
		stdio: ['ignore', 'pipe', 'pipe']
	});
	let said = '';
	let complained = '';
	child.stderr.on('data', (part: Buffer) => (complained += part.toString()));
	const url = await new Promise<string>((found, failed) => {
		child.stdout.on('data', (part: Buffer) => {
			said += part.toString();
			const address = /^Listening on (http:\S+)$/m.exec(said)?.[1];
			if (address !== undefined) found(address);
		});
		child.once('exit', (code) =>
			failed(new Error(`the server ended with ${code} before it listened: ${complained}`))
		);
	});
	return { child, url, log: () => said };
}

/** Sends SIGTERM and waits for the end. */
export async function endServer(child: ChildProcess): Promise<number | null> {
	if (child.exitCode !== null) return child.exitCode;
	const end = new Promise<number | null>((done) => child.once('exit', done));
	child.kill('SIGTERM');
	return end;
}
