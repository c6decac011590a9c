import { spawn } from 'node:child_process';
import type { ChildProcess } from 'node:child_process';
import { cpSync, mkdirSync, rmSync } from 'node:fs';
import { createServer } from 'node:net';
import { resolve } from 'node:path';
import type { FullConfig } from '@playwright/test';

const WORK = resolve('tests/.work');

/** Where the suite's server listens; the stories read it from the environment. */
export const ORIGIN_VARIABLE = 'PLATEN_JOURNEY_ORIGIN';

function freePort(): Promise<number> {
	return new Promise((found, failed) => {
		const probe = createServer();
		probe.once('error', failed);
		probe.listen(0, '127.0.0.1', () => {
			const address = probe.address();
			const port = typeof address === 'object' && address !== null ? address.port : 0;
			probe.close(() => found(port));
		});
	});
}

function ended(child: ChildProcess): Promise<number | null> {
	return new Promise((done) => child.once('exit', (code) => done(code)));
}

async function answers(url: string, child: ChildProcess): Promise<void> {
	const deadline = Date.now() + 30_000;
	while (Date.now() < deadline) {
		if (child.exitCode !== null) throw new Error(`the server ended with ${child.exitCode}`);
		const isReady = await fetch(url).then(
			(response) => response.ok,
			() => false
		);
		if (isReady) return;
		await new Promise((next) => setTimeout(next, 100));
	}
	throw new Error(`${url} gave no answer within 30 s`);
}

/**
 * Seeds a data folder once, serves a copy of it by the production build, and ends the server after
 * the last story.
 */
export default async function setup(_config: FullConfig): Promise<() => Promise<void>> {
	const seeded = resolve(WORK, 'seeded');
	const served = resolve(WORK, 'served');
	for (const folder of [seeded, served]) rmSync(folder, { recursive: true, force: true });
	mkdirSync(WORK, { recursive: true });

	const port = await freePort();
	const origin = `http://localhost:${port}`;
	const env = {
		...process.env,
		NODE_ENV: 'production',
		DEMO: '1',
		HOST: '127.0.0.1',
		PORT: String(port),
		ORIGIN: origin,
		BODY_SIZE_LIMIT: 'Infinity'
	};

	const seed = spawn(process.execPath, ['build/tasks/seed.js'], {
		env: { ...env, DATA_DIR: seeded },
		stdio: ['ignore', 'ignore', 'inherit']
	});
	const code = await ended(seed);
	if (code !== 0) throw new Error(`the seed ended with ${code}`);
	cpSync(seeded, served, { recursive: true });

	const server = spawn(process.execPath, ['build'], {
		env: { ...env, DATA_DIR: served },
		stdio: ['ignore', 'ignore', 'inherit']
	});
	await answers(`${origin}/readyz`, server);
	process.env[ORIGIN_VARIABLE] = origin;

	return async () => {
		const end = ended(server);
		server.kill('SIGTERM');
		await end;
	};
}
