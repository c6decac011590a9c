import type { Database } from '../db/database';
import { findNewestJob } from '../db/findNewestJob';
import { importKey } from './mapUpload';

/** How far the server is with an upload. */
export interface UploadProgress {
	readonly done: number;
	readonly total: number;
	readonly words: string;
}

export type UploadWork =
	| { readonly status: 'idle' }
	| { readonly status: 'working'; readonly progress: UploadProgress }
	/** The work ended by a fault of ours, not by what is in the file. */
	| { readonly status: 'failed'; readonly message: string };

/** What the server does with an upload at the moment. */
export async function uploadProgress(
	db: Database,
	upload: { readonly id: number; readonly state: string }
): Promise<UploadWork> {
	if (upload.state !== 'received' && upload.state !== 'mapped') return { status: 'idle' };
	const key = upload.state === 'received' ? `read-upload:${upload.id}` : importKey(upload.id);
	const job = await findNewestJob(db, key);
	if (job?.state === 'queued' || job?.state === 'running') {
		return {
			status: 'working',
			progress: job.progress ?? { done: 0, total: 0, words: 'Waits for its turn' }
		};
	}
	return job?.state === 'failed'
		? { status: 'failed', message: job.error ?? '' }
		: { status: 'idle' };
}
