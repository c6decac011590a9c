import { createHash } from 'node:crypto';
import { canonicalBytes } from '$lib/core/datasheet/canonicalBytes';
import { changedRows, compareDocuments } from '$lib/core/datasheet/compareDocuments';
import { publicationRecord } from '$lib/core/datasheet/record';
import { draftMessages } from '$lib/core/messages/datasheet';
import { findDraft } from '../db/findDraft';
import { findJob } from '../db/findJob';
import { findNewestJob } from '../db/findNewestJob';
import { findPreviousRelease } from '../db/findPreviousRelease';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import { write } from '../db/write';
import { rendererVersion } from '../pdf/rendererVersion';
import { enqueue } from '../work/enqueue';
import type { Stores } from '../work/stores';
import { refused, type DraftEditor, type Refused } from './editDraft';
import { drawnProof } from './renderProof';
import { resolveDraft } from './resolveDraft';

export type ProofOutcome =
	| { readonly status: 'drawn'; readonly key: string; readonly sha256: string }
	| { readonly status: 'late'; readonly job: number }
	| Refused;

const FIRST_PAUSE_MILLISECONDS = 40;
const LONGEST_PAUSE_MILLISECONDS = 400;

/**
 * The proof of a draft as a PDF: found by its content, or drawn by a job that is waited for.
 *
 * @param waitMilliseconds how long; after that the job goes on, and asking again finds it
 */
export async function drawProof(
	stores: Stores,
	{ partNumber, by, waitMilliseconds }: DraftEditor & { readonly waitMilliseconds: number }
): Promise<ProofOutcome> {
	const { db } = stores;
	const started = Date.now();
	const product = await findProductByPartNumber(db, partNumber);
	if (product === undefined) return refused(draftMessages.productUnknown(partNumber));
	if ((await findDraft(db, product.id)) === undefined)
		return refused(draftMessages.noDraft(partNumber));

	const job = await proofJob(stores, { product: product.id, by });
	let pause = FIRST_PAUSE_MILLISECONDS;
	for (;;) {
		const found = await findJob(db, job);
		if (found?.state === 'done') return { status: 'drawn', ...drawnProof.parse(found.result) };
		if (found?.state === 'failed') return refused(draftMessages.proofFailed(found.error ?? ''));
		if (Date.now() - started > waitMilliseconds) return { status: 'late', job };
		await new Promise((next) => setTimeout(next, pause));
		pause = Math.min(pause * 1.5, LONGEST_PAUSE_MILLISECONDS);
	}
}

/** The job that draws this content: one that has drawn it, one under way, or a new one. */
async function proofJob(
	{ db, storage }: Stores,
	{ product, by }: { readonly product: number; readonly by: string }
): Promise<number> {
	const at = new Date().toISOString();
	const { proof } = await resolveDraft(db, product);
	const bytes = canonicalBytes(proof);
	const contentHash = createHash('sha256').update(bytes).digest('hex');
	const previous = await findPreviousRelease(db, product);
	const dedupeKey = ['render-proof', contentHash, previous?.id ?? 'first', rendererVersion].join(
		':'
	);
	const drawn = await findNewestJob(db, dedupeKey);
	if (drawn !== undefined && drawn.state !== 'failed') return drawn.id;

	const record = publicationRecord.parse({
		kind: 'draft',
		version: null,
		date: at.slice(0, 10),
		at,
		contentHash,
		previous: previous
			? {
					version: { major: previous.major, minor: previous.minor },
					date: previous.effectiveFrom.slice(0, 10)
				}
			: null,
		history: [],
		changedRows: previous ? changedRows(compareDocuments(previous.document, proof)) : []
	});
	const { key: document } = await storage.put(bytes);
	return write(db, (tx) =>
		enqueue(tx, { kind: 'render-proof', payload: { document, record }, dedupeKey, by })
	);
}
