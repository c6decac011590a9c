import { keepAuditHead } from './auditHead';
import { attempts } from './auth/attempts';
import type { Attempts } from './auth/attempts';
import { openSessions } from './auth/sessions';
import type { Sessions } from './auth/sessions';
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
import { startRunner } from './work/runner';
import type { Stores } from './work/stores';

/** What the process holds open; everything else lives in the database. */
export interface Application extends Stores {
	readonly config: Config;
	readonly log: Log;
	readonly sessions: Sessions;
	readonly changes: Changes;
	/** Failed sign-ins, by address and by email. */
	readonly signInAttempts: Attempts;
	/** Requests with a token that gives no right, by address. */
	readonly tokenAttempts: Attempts;
}

const QUARTER_HOUR = 900;
const SETTLE_EVERY_MILLISECONDS = 10_000;

let opened: { readonly application: Application; readonly close: () => Promise<void> } | undefined;

/** Reads the environment, opens and migrates the database, and starts to work the queue off. */
export async function openApplication(
	env: Readonly<Record<string, string | undefined>>
): Promise<Application> {
	const config = readConfig(env);
	const log = openLog(config.logLevel);
	const { db, close } = await openDatabase(config.databaseUrl);
	await migrateDatabase(db);
	await ensureDefaults({ db });

	const runner = startRunner({
		db,
		log,
		entry: config.workerEntry,
		thread: { databaseUrl: config.databaseUrl, storageFolder: config.storageFolder }
	});
	const changes = watchChanges(db);
	const settle = () =>
		Promise.all([settleDueReleases({ db }), keepAuditHead(db, config.dataDir)]).catch(
			(problem: unknown) => log.error({ err: problem })
		);
	await settle();
	const settling = setInterval(() => void settle(), SETTLE_EVERY_MILLISECONDS);
	const application: Application = {
		config,
		log,
		db,
		storage: folderStorage(config.storageFolder),
		sessions: openSessions(db, config.origin.startsWith('https:')),
		changes,
		signInAttempts: attempts(10, QUARTER_HOUR),
		tokenAttempts: attempts(30, QUARTER_HOUR)
	};
	opened = {
		application,
		async close() {
			changes.stop();
			clearInterval(settling);
			await runner.stop();
			await settle();
			close();
		}
	};
	return application;
}

/** The open application. @throws when a request comes before it is open */
export function application(): Application {
	if (opened === undefined) throw new Error('the application is not open');
	return opened.application;
}

export async function closeApplication(): Promise<void> {
	await opened?.close();
	opened = undefined;
}
