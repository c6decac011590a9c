import { Worker } from 'node:worker_threads';
import { jobFailed } from '$lib/core/messages';
import type { Connection } from '../db/database';
import type { Log } from '../logging';
import {
	LEASE_MILLISECONDS,
	claimJob,
	failJob,
	finishJob,
	prolongLease,
	releaseJob
} from './claim';
import type { ClaimedJob } from './claim';
import type { FromThread, ThreadSetup } from './threadMessages';

const LOOK_EVERY_MILLISECONDS = 250;
const HEARTBEAT_MILLISECONDS = LEASE_MILLISECONDS / 3;

export interface Runner {
	/** Stops claiming, puts a running job back into the queue and ends the thread. */
	stop(): Promise<void>;
}

export interface RunnerSetup {
	readonly db: Connection;
	readonly log: Log;
	/** The built worker. */
	readonly entry: string;
	readonly thread: ThreadSetup;
}

/**
 * Claims jobs in the main thread and has them run in a worker thread, one at a time. The main
 * thread keeps the lease, since the worker is busy; a thread that dies gives its job back.
 */
export function startRunner({ db, log, entry, thread }: RunnerSetup): Runner {
	let worker: Worker | undefined;
	let running: ClaimedJob | undefined;
	let isStopped = false;
	let timer: NodeJS.Timeout | undefined;

	const openThread = (): Worker => {
		const opened = new Worker(entry, { workerData: thread });
		opened.on('error', (problem) => log.error({ err: problem }, 'the worker thread died'));
		opened.on('exit', () => {
			if (worker === opened) worker = undefined;
		});
		return opened;
	};

	async function runInThread(job: ClaimedJob): Promise<void> {
		const held = (worker ??= openThread());
		const heartbeat = setInterval(() => {
			void prolongLease(db, job).then((isOurs) => {
				if (!isOurs) void held.terminate();
			});
		}, HEARTBEAT_MILLISECONDS);
		try {
			const end = await answerOf(held, job, (progress) => void prolongLease(db, job, progress));
			if (end === undefined) await releaseJob(db, job);
			else if (end.status === 'done') await finishJob(db, job, end.result);
			else {
				if (end.fault !== undefined) log.error({ job: job.id, kind: job.kind, fault: end.fault });
				await failJob(db, job, end.error);
			}
		} finally {
			clearInterval(heartbeat);
		}
	}

	async function look(): Promise<void> {
		try {
			for (
				let job = await claimJob(db);
				job !== undefined && !isStopped;
				job = await claimJob(db)
			) {
				running = job;
				log.info({ job: job.id, kind: job.kind, attempt: job.attempt }, 'job taken');
				await runInThread(job);
				running = undefined;
			}
		} catch (problem) {
			log.error({ err: problem }, jobFailed());
			running = undefined;
		}
		if (!isStopped) timer = setTimeout(() => void look(), LOOK_EVERY_MILLISECONDS);
	}

	void look();

	return {
		async stop() {
			isStopped = true;
			clearTimeout(timer);
			const interrupted = running;
			await worker?.terminate();
			if (interrupted !== undefined) await releaseJob(db, interrupted);
		}
	};
}

/** Hands a job to the thread and waits for its end; `undefined` when the thread died over it. */
function answerOf(
	worker: Worker,
	job: ClaimedJob,
	onProgress: (progress: Extract<FromThread, { kind: 'progress' }>['progress']) => void
) {
	return new Promise<Extract<FromThread, { kind: 'end' }>['end'] | undefined>((answer) => {
		const hear = (message: FromThread) => {
			if (message.kind === 'progress') onProgress(message.progress);
			if (message.kind === 'end') done(message.end);
		};
		const die = () => done(undefined);
		const done = (end: Extract<FromThread, { kind: 'end' }>['end'] | undefined) => {
			worker.off('message', hear);
			worker.off('exit', die);
			answer(end);
		};
		worker.on('message', hear);
		worker.on('exit', die);
		worker.postMessage(job);
	});
}
