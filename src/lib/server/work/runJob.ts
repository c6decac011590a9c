import { RefusalError } from '$lib/core/errors';
import { jobFailed } from '$lib/core/messages';
import { isCurrentAttempt } from './claim';
import type { ClaimedJob } from './claim';
import type { JobHandler, JobProgress } from './jobHandler';
import type { Stores } from './stores';

export type JobEnd =
	| { readonly status: 'done'; readonly result: unknown }
	/** `fault` is what a log may say; `error` is for people. */
	| { readonly status: 'failed'; readonly error: string; readonly fault?: string };

/** Runs one claimed job by its handler; a refusal ends it with its own sentence. */
export async function runJob(
	stores: Stores,
	handlers: Readonly<Record<string, JobHandler>>,
	job: ClaimedJob,
	report: (progress: JobProgress) => void
): Promise<JobEnd> {
	const handler = handlers[job.kind];
	try {
		if (handler === undefined) throw new Error(`no handler does jobs of kind ${job.kind}`);
		const result = await handler(stores, job.payload, {
			id: job.id,
			attempt: job.attempt,
			report,
			isCurrent: () => isCurrentAttempt(stores.db, job)
		});
		return { status: 'done', result: result ?? null };
	} catch (problem) {
		if (problem instanceof RefusalError) return { status: 'failed', error: problem.message };
		const fault = problem instanceof Error ? (problem.stack ?? problem.message) : String(problem);
		return { status: 'failed', error: jobFailed(), fault };
	}
}
