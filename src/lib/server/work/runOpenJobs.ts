import { claimJob, failJob, finishJob } from './claim';
import type { ClaimedJob } from './claim';
import type { JobHandler, JobProgress } from './jobHandler';
import { runJob } from './runJob';
import type { Stores } from './stores';

export interface RunOpenJobs {
	readonly onProgress?: (job: ClaimedJob, progress: JobProgress) => void;
}

/** A job of the queue ended badly while the queue was worked off in place. */
export class JobFailedError extends Error {
	override readonly name = 'JobFailedError';
	constructor(
		readonly kind: string,
		reason: string
	) {
		super(`${kind}: ${reason}`);
	}
}

/**
 * Works the queue off in this very process, also what its jobs enqueue: for the seed and for tests.
 *
 * @throws {JobFailedError} at the first job that fails
 */
export async function runOpenJobs(
	stores: Stores,
	handlers: Readonly<Record<string, JobHandler>>,
	{ onProgress }: RunOpenJobs = {}
): Promise<void> {
	for (let job = await claimJob(stores.db); job !== undefined; job = await claimJob(stores.db)) {
		const claimed = job;
		const end = await runJob(stores, handlers, claimed, (progress) =>
			onProgress?.(claimed, progress)
		);
		if (end.status === 'failed') {
			await failJob(stores.db, claimed, end.error);
			throw new JobFailedError(claimed.kind, end.fault ?? end.error);
		}
		await finishJob(stores.db, claimed, end.result);
	}
}
