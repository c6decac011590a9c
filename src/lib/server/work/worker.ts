import { parentPort, workerData } from 'node:worker_threads';
import { openDatabase } from '../db/client';
import { folderStorage } from '../storage/folderStorage';
import { handlers } from './handlers';
import { runJob } from './runJob';
import type { FromThread, ThreadSetup, ToThread } from './threadMessages';

/*
 * The worker thread: long computations with a database connection of their own, so that the
 * thread that answers requests never waits for them. The main thread claims, prolongs and ends.
 */

if (parentPort === null) throw new Error('the worker is a thread of the server');
const main = parentPort;
const setup = workerData as ThreadSetup;
const say = (message: FromThread) => main.postMessage(message);

const { db } = await openDatabase(setup.databaseUrl);
const stores = { db, storage: folderStorage(setup.storageFolder) };

const SHORTEST_PAUSE_MILLISECONDS = 200;

main.on('message', (job: ToThread) => {
	let saidAt = 0;
	void runJob(stores, handlers, job, (progress) => {
		const now = performance.now();
		if (now - saidAt < SHORTEST_PAUSE_MILLISECONDS && progress.done < progress.total) return;
		saidAt = now;
		say({ kind: 'progress', progress });
	}).then((end) => say({ kind: 'end', end }));
});

say({ kind: 'ready' });
