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
import type { JobPlace } from './jobPlace';

const LOOK_EVERY_MILLISECONDS = 250;
const HEARTBEAT_MILLISECONDS = LEASE_MILLISECONDS / 3;

export interface Runner {
	/** Stops claiming, breaks a running job off and puts it back into the queue. */
	stop(): Promise<void>;
}

export interface RunnerSetup {
	readonly db: Connection;
	readonly log: Log;
	/** Where the work is done. */
	readonly place: JobPlace;
}

/**
 * Claims jobs and has them done elsewhere, one at a time. The lease is kept here, since the place
 * is busy; a job whose place died goes back into the queue, and the attempt counts.
 */
export function startRunner({ db, log, place }: RunnerSetup): Runner {
	let isStopped = false;
	let wake = () => {};

	const pause = () =>
		new Promise<void>((next) => {
			const timer = setTimeout(next, LOOK_EVERY_MILLISECONDS);
			wake = () => {
				clearTimeout(timer);
				next();
			};
		});
	const complain = (problem: unknown) => log.error({ err: problem }, jobFailed());

	async function workQueue(): Promise<void> {
		while (!isStopped) {
			const job = await claimJob(db).catch(complain);
			if (job === undefined) await pause();
			else await carryOut(job).catch(complain);
		}
	}

	async function carryOut(job: ClaimedJob): Promise<void> {
		if (isStopped) {
			await releaseJob(db, job, { isCounted: false });
			return;
		}
		log.info({ job: job.id, kind: job.kind, attempt: job.attempt }, 'job taken');
		const heartbeat = setInterval(() => {
			prolongLease(db, job)
				.then((isOurs) => (isOurs ? undefined : place.breakOff()))
				.catch(complain);
		}, HEARTBEAT_MILLISECONDS);
		try {
			const end = await place.run(job, (progress) => {
				prolongLease(db, job, progress).catch(complain);
			});
			if (end === undefined) await releaseJob(db, job, { isCounted: !isStopped });
			else if (end.status === 'done') await finishJob(db, job, end.result);
			else {
				if (end.fault !== undefined) log.error({ job: job.id, kind: job.kind, fault: end.fault });
				await failJob(db, job, end.error);
			}
		} finally {
			clearInterval(heartbeat);
		}
	}

	const working = workQueue();

	return {
		async stop() {
			isStopped = true;
			wake();
			await place.breakOff();
			await working;
		}
	};
}
