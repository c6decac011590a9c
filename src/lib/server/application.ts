import { keepAuditHead } from './auditHead';
import { existsSync } from 'node:fs';
import { attempts } from './auth/attempts';
import type { Attempts } from './auth/attempts';
import { openSessions } from './auth/sessions';
import type { Sessions } from './auth/sessions';
import { signInAttempts } from './auth/signInAttempts';
import type { SignInAttempts } from './auth/signInAttempts';
import { readConfig } from './config';
import type { Config } from './config';
import { openDatabase } from './db/client';
import { migrateDatabase } from './db/migrate';
import { openLog } from './logging';
import type { Log } from './logging';
import { ensureDefaults } from './services/ensureDefaults';
import { settleDueReleases } from './services/settleDueReleases';
import { folderStorage } from './storage/folderStorage';
import { watchChanges } from './work/changes';
import type { Changes } from './work/changes';
import { inlinePlace } from './work/jobPlace';
import type { JobPlace } from './work/jobPlace';
import { startRunner } from './work/runner';
import type { Stores } from './work/stores';
import { threadPlace } from './work/threadPlace';

/** What the process holds open; everything else lives in the database. */
export interface Application extends Stores {
	readonly config: Config;
	readonly log: Log;
	readonly sessions: Sessions;
	readonly changes: Changes;
	readonly signInAttempts: SignInAttempts;
	/** Requests with a token that gives no right, by address. */
	readonly tokenAttempts: Attempts;
}

const QUARTER_HOUR = 900;
const SETTLE_EVERY_MILLISECONDS = 30_000;

let opened:
	| {
			readonly application: Application;
			readonly stopWork: () => Promise<void>;
			readonly close: () => Promise<void>;
	  }
	| undefined;

/** Reads the environment, opens and migrates the database, and starts to work the queue off. */
export async function openApplication(
	env: Readonly<Record<string, string | undefined>>
): Promise<Application> {
	const config = readConfig(env);
	const log = openLog(config.logLevel);
	const { db, close } = await openDatabase(config.databaseUrl);
	await migrateDatabase(db);
	await ensureDefaults({ db });

	const storage = folderStorage(config.storageFolder);
	const sessions = openSessions(db, config.origin?.startsWith('https:') ?? false);
	const runner = startRunner({ db, log, place: await placeOfWork({ db, storage, config, log }) });
	const changes = watchChanges(db);
	const complain = (problem: unknown) => log.error({ err: problem });
	const settle = () =>
		Promise.all([settleDueReleases({ db }), keepAuditHead(db, config.dataDir)]).catch(complain);
	await sessions.deleteExpiredSessions();
	await settle();
	const settling = setInterval(() => void settle(), SETTLE_EVERY_MILLISECONDS);
	changes.listen(
		() => void keepAuditHead(db, config.dataDir).catch(complain),
		() => undefined
	);

	const application: Application = {
		config,
		log,
		db,
		storage,
		sessions,
		changes,
		signInAttempts: signInAttempts(),
		tokenAttempts: attempts(30, QUARTER_HOUR)
	};
	const stopWork = async () => {
		changes.stop();
		clearInterval(settling);
		await runner.stop();
	};
	opened = {
		application,
		stopWork,
		async close() {
			await stopWork();
			await settle();
			close();
		}
	};
	return application;
}

/** A thread of the built worker; a server that runs from its sources and has none works in place. */
async function placeOfWork({
	db,
	storage,
	config,
	log
}: Stores & { readonly config: Config; readonly log: Log }): Promise<JobPlace> {
	const { workerEntry: entry, databaseUrl, storageFolder } = config;
	if (existsSync(entry)) return threadPlace({ entry, thread: { databaseUrl, storageFolder }, log });
	log.warn('there is no built worker: jobs run in the thread that answers requests');
	const { handlers } = await import('./work/handlers');
	return inlinePlace({ db, storage }, handlers);
}

/** The open application. @throws when a request comes before it is open */
export function application(): Application {
	if (opened === undefined) throw new Error('the application is not open');
	return opened.application;
}

/** Ends what would keep a request open for ever and takes no more jobs; requests are still answered. */
export async function stopWork(): Promise<void> {
	await opened?.stopWork();
}

export async function closeApplication(): Promise<void> {
	await opened?.close();
	opened = undefined;
}
