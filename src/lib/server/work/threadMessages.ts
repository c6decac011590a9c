import type { ClaimedJob } from './claim';
import type { JobProgress } from './jobHandler';
import type { JobEnd } from './runJob';

/** What the thread is started with. */
export interface ThreadSetup {
	readonly databaseUrl: string;
	readonly storageFolder: string;
}

/** To the thread: a job to run. */
export type ToThread = ClaimedJob;

/** From the thread. */
export type FromThread =
	| { readonly kind: 'ready' }
	| { readonly kind: 'progress'; readonly progress: JobProgress }
	| { readonly kind: 'end'; readonly end: JobEnd };
