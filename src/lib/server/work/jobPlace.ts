import type { ClaimedJob } from './claim';
import type { JobHandler, JobProgress } from './jobHandler';
import { runJob } from './runJob';
import type { JobEnd } from './runJob';
import type { Stores } from './stores';

/** Where jobs are done: a thread of its own, or this very one. */
export interface JobPlace {
	/** Does a job to its end; `undefined` when the place died over it. */
	run(job: ClaimedJob, report: (progress: JobProgress) => void): Promise<JobEnd | undefined>;
	/** Ends what runs, as far as the place can. */
	breakOff(): Promise<void>;
}

/** Does jobs in this very thread, for a server that runs from its sources; it can't break one off. */
export function inlinePlace(
	stores: Stores,
	handlers: Readonly<Record<string, JobHandler>>
): JobPlace {
	return {
		run: (job, report) => runJob(stores, handlers, job, report),
		breakOff: () => Promise.resolve()
	};
}
