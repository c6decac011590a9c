import type { Stores } from './stores';

export interface JobProgress {
	readonly done: number;
	readonly total: number;
	readonly words: string;
}

export interface JobContext {
	readonly id: number;
	readonly attempt: number;
	report(progress: JobProgress): void;
	/** The fence: whether this attempt is still the newest. */
	isCurrent(): Promise<boolean>;
}

/** Does one kind of job; what it returns is kept as the job's result, as JSON. */
export type JobHandler = (stores: Stores, payload: unknown, job: JobContext) => Promise<unknown>;
