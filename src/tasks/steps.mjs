/*
 * What the two commands of the README share. Plain JavaScript on Node alone: it runs on a fresh
 * clone, before anything is installed.
 */
import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

export const ROOT = resolve(fileURLToPath(import.meta.url), '../../..');

const INSTALLED = join(ROOT, 'node_modules/.platen-installed');
const BUILT = join(ROOT, 'build/.platen-built');
const LOCK = join(ROOT, 'node_modules/.platen-lock');

/** What the build reads; a change in any of it makes the build stale. */
const SOURCES = [
	'src',
	'static',
	'templates',
	'drizzle',
	'package-lock.json',
	'svelte.config.js',
	'vite.config.ts',
	'tailwind.config.ts',
	'tsconfig.json'
];

/**
 * Runs a program to its end; rejects with the command when it fails.
 *
 * @param {string} command
 * @param {readonly string[]} args
 * @param {{ env?: NodeJS.ProcessEnv, quiet?: boolean }} [options]
 * @returns {Promise<void>}
 */
export function run(command, args, { env = process.env, quiet = false } = {}) {
	return new Promise((done, failed) => {
		const child = spawn(command, [...args], {
			cwd: ROOT,
			env,
			stdio: quiet ? ['ignore', 'ignore', 'inherit'] : ['ignore', 'inherit', 'inherit']
		});
		child.on('error', failed);
		child.on('exit', (code, signal) => {
			if (code === 0) done();
			else failed(new Error(`${command} ${args.join(' ')} ended with ${signal ?? code}`));
		});
	});
}

/**
 * @param {string} path
 * @returns {string[]}
 */
function files(path) {
	const whole = join(ROOT, path);
	if (!existsSync(whole)) return [];
	const entries = safeEntries(whole);
	if (entries === undefined) return [path];
	return entries.flatMap((entry) => files(join(path, entry)));
}

/** @param {string} path */
function safeEntries(path) {
	try {
		return readdirSync(path).sort();
	} catch {
		return undefined;
	}
}

/** @param {readonly string[]} paths */
function hashOf(paths) {
	const hash = createHash('sha256');
	for (const path of paths.flatMap(files)) {
		hash
			.update(path)
			.update('\0')
			.update(readFileSync(join(ROOT, path)))
			.update('\0');
	}
	return hash.digest('hex');
}

/** @param {string} path */
const written = (path) => (existsSync(path) ? readFileSync(path, 'utf8') : '');

/** Installs what the lock file names, once for each content of it. */
export async function install() {
	const wanted = hashOf(['package-lock.json']);
	if (written(INSTALLED) === wanted) return;
	await run('npm', ['ci', '--no-audit', '--no-fund', '--loglevel=error']);
	writeFileSync(INSTALLED, wanted);
}

/** Builds the application and its tasks unless what stands in `build/` is of these sources. */
export async function build() {
	const wanted = hashOf(SOURCES);
	if (written(BUILT) === wanted) return;
	rmSync(BUILT, { force: true });
	// Called from a test, NODE_ENV is `test`, and the framework would build its development side.
	const env = { ...process.env, NODE_ENV: 'production' };
	await run('npm', ['run', '--silent', 'build'], { env, quiet: true });
	writeFileSync(BUILT, wanted);
}

/** @param {number} pid */
function isAlive(pid) {
	try {
		process.kill(pid, 0);
		return true;
	} catch {
		return false;
	}
}

/**
 * One process installs and builds at a time; two copies may be started together.
 *
 * @template Result
 * @param {() => Promise<Result>} work
 * @returns {Promise<Result>}
 */
export async function alone(work) {
	mkdirSync(join(ROOT, 'node_modules'), { recursive: true });
	for (;;) {
		try {
			writeFileSync(LOCK, String(process.pid), { flag: 'wx' });
			break;
		} catch (problem) {
			if (!(problem instanceof Error && 'code' in problem && problem.code === 'EEXIST'))
				throw problem;
			if (!isAlive(Number(written(LOCK)))) rmSync(LOCK, { force: true });
			else await new Promise((next) => setTimeout(next, 500));
		}
	}
	try {
		return await work();
	} finally {
		rmSync(LOCK, { force: true });
	}
}

/**
 * Says what is done and how long it took.
 *
 * @template Result
 * @param {string} name
 * @param {() => Promise<Result>} work
 * @returns {Promise<Result>}
 */
export async function step(name, work) {
	process.stdout.write(`${name} …\n`);
	const start = Date.now();
	const result = await work();
	process.stdout.write(`${name}: ${((Date.now() - start) / 1000).toFixed(1)} s\n`);
	return result;
}
