import { eq } from 'drizzle-orm';
import { completeMapping } from '$lib/core/measurements/requestedMapping';
import type { RequestedMapping } from '$lib/core/measurements/requestedMapping';
import { measurementMessages } from '$lib/core/messages/measurements';
import { appendAudit } from '../db/appendAudit';
import { findNewestJob } from '../db/findNewestJob';
import { findUpload } from '../db/findUpload';
import { upload } from '../db/schema';
import { write } from '../db/write';
import { enqueue } from '../work/enqueue';
import type { Stores } from '../work/stores';

export type MapOutcome =
	| { readonly status: 'mapped'; readonly upload: number; readonly job: number }
	| {
			readonly status: 'refused';
			readonly why: 'notFound' | 'notNow' | 'incomplete';
			readonly message: string;
			/** One sentence for each thing that is missing. */
			readonly messages: readonly string[];
	  };

/** The job that imports an upload. */
export const importKey = (upload: number) => `import-measurement-set:${upload}`;

/**
 * Takes what a person says the columns of an upload mean and queues its import. An upload that was
 * refused can be mapped again, for instance with the lines left out that can't be used.
 */
export async function mapUpload(
	{ db }: Pick<Stores, 'db'>,
	input: {
		readonly upload: number;
		readonly request: RequestedMapping;
		readonly by: string;
	}
): Promise<MapOutcome> {
	const { request, by } = input;
	return write(db, async (tx) => {
		const found = await findUpload(tx, input.upload);
		if (found === undefined) {
			return refused('notFound', measurementMessages.uploadNotFound(input.upload));
		}
		switch (found.state) {
			case 'received':
				return refused('notNow', measurementMessages.notReadYet());
			case 'accepted':
				return refused('notNow', measurementMessages.alreadyAccepted());
			case 'mapped':
			case 'read':
			case 'refused':
				break;
			default:
				return found.state satisfies never;
		}
		const newest = await findNewestJob(tx, importKey(found.id));
		if (newest?.state === 'queued' || newest?.state === 'running') {
			return refused('notNow', measurementMessages.alreadyImporting());
		}
		if (found.preview === null) return refused('notNow', measurementMessages.cannotBeRead());

		const outcome = completeMapping(found.preview, request);
		if (outcome.status === 'incomplete') return refused('incomplete', ...outcome.messages);
		const { mapping, setup } = outcome;
		await tx
			.update(upload)
			.set({ state: 'mapped', mapping: { mapping, setup }, problems: null })
			.where(eq(upload.id, found.id));
		const job = await enqueue(tx, {
			kind: 'import-measurement-set',
			payload: { upload: found.id, by },
			dedupeKey: importKey(found.id),
			by
		});
		await appendAudit(tx, {
			action: 'upload.map',
			subject: `${found.partNumber} ${found.fileName}`,
			by,
			details: {
				upload: found.id,
				columns: mapping.columns,
				biasSign: mapping.biasSign,
				skipLines: mapping.skipLines
			}
		});
		return { status: 'mapped', upload: found.id, job };
	});
}

function refused(
	why: 'notFound' | 'notNow' | 'incomplete',
	...messages: readonly string[]
): MapOutcome {
	return { status: 'refused', why, message: messages.join(' '), messages };
}
