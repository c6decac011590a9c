import { accessSync, constants, mkdirSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { z } from 'zod';

const environment = z.object({
	PORT: z.coerce.number('expected a number').int().min(0).max(65_535).default(3000),
	HOST: z.string().min(1).default('0.0.0.0'),
	ORIGIN: z
		.url({ protocol: /^https?$/, error: 'expected an address like https://host' })
		.optional(),
	DATA_DIR: z.string().min(1).default('data'),
	DATABASE_URL: z
		.string()
		.regex(/^(file:|libsql:|https?:)/, 'expected file:, libsql: or https:')
		.optional(),
	STORAGE_URL: z
		.string()
		.regex(/^file:/, 'expected file:')
		.optional(),
	UPLOAD_LIMIT_MB: z.coerce.number('expected a number').positive().default(512),
	DEMO: z.enum(['0', '1']).default('0'),
	LOG_LEVEL: z.enum(['debug', 'info', 'warn', 'error', 'silent']).default('info')
});

export interface Config {
	readonly port: number;
	readonly host: string;
	/**
	 * Where people reach the server; cookie requests that change something come from here. Not
	 * given, they come from the host they ask.
	 */
	readonly origin: string | undefined;
	readonly dataDir: string;
	readonly databaseUrl: string;
	/** The folder published files and uploads lie in. */
	readonly storageFolder: string;
	/** The largest measurement file that is taken. */
	readonly uploadLimitBytes: number;
	readonly isDemo: boolean;
	readonly logLevel: 'debug' | 'info' | 'warn' | 'error' | 'silent';
	/** The built worker thread. */
	readonly workerEntry: string;
}

/** The environment can't be used; the message names every variable and what was expected. */
export class ConfigError extends Error {
	override readonly name = 'ConfigError';
}

/**
 * Reads and checks the environment, and makes the data folder.
 *
 * @throws {ConfigError} naming every variable that is wrong, never its value
 */
export function readConfig(env: Readonly<Record<string, string | undefined>>): Config {
	const read = environment.safeParse(env);
	if (!read.success) {
		const faults = read.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`);
		throw new ConfigError(`The environment can't be used. ${faults.join('; ')}`);
	}
	const { PORT, HOST, ORIGIN, DATA_DIR, DATABASE_URL, STORAGE_URL, DEMO, LOG_LEVEL } = read.data;
	const dataDir = usableFolder('DATA_DIR', resolve(DATA_DIR));
	return {
		port: PORT,
		host: HOST,
		origin: ORIGIN === undefined ? undefined : new URL(ORIGIN).origin,
		dataDir,
		databaseUrl: DATABASE_URL ?? pathToFileURL(join(dataDir, 'platen.db')).href,
		storageFolder: usableFolder(
			'STORAGE_URL',
			STORAGE_URL === undefined
				? join(dataDir, 'files')
				: resolve(STORAGE_URL.slice('file:'.length))
		),
		uploadLimitBytes: read.data.UPLOAD_LIMIT_MB * 1e6,
		isDemo: DEMO === '1',
		logLevel: LOG_LEVEL,
		workerEntry: resolve('build/tasks/worker.js')
	};
}

function usableFolder(variable: string, path: string): string {
	try {
		mkdirSync(path, { recursive: true });
		accessSync(path, constants.W_OK);
		return path;
	} catch {
		throw new ConfigError(
			`The environment can't be used. ${variable}: the folder can't be made or written`
		);
	}
}
