import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { RefusalError } from '$lib/core/errors';
import { publicationRecord, versionText, type PublicationRecord } from '$lib/core/datasheet/record';
import { notApprovedAnymore, publishedDocumentDamaged } from '$lib/core/messages/publish';
import { nextRevisionState, REVISION_STATE_WORDS } from '$lib/core/review/states';
import { appendAudit } from '../db/appendAudit';
import { findReleaseOfRevision } from '../db/findRelease';
import { findRevisionById, type FoundRevision } from '../db/findRevision';
import { decision, release, releaseFile, revision as revisionTable } from '../db/schema';
import { write } from '../db/write';
import { rendererVersion } from '../pdf/rendererVersion';
import type { StoredFile } from '../storage/storage';
import type { JobHandler } from '../work/jobHandler';
import type { Stores } from '../work/stores';
import {
	makeReleaseFile,
	RELEASE_FILE_NAMES,
	RELEASE_FILES,
	type ReleaseFileName
} from './releaseFiles';
import { settleProduct } from './settleProduct';
import { sha256 } from './sha256';

const payloadSchema = z.object({
	revision: z.number().int(),
	record: publicationRecord,
	previous: z.number().int().nullable(),
	by: z.string()
});
type Payload = z.infer<typeof payloadSchema>;

type WrittenFile = StoredFile & { readonly name: ReleaseFileName };

/**
 * Publishes a revision:
 *
 *   check → render → files by their hash, on disk → one transaction writes release and states
 *
 * It may be interrupted anywhere and run again: rendering gives the same bytes, files are stored
 * under their hash, and the transaction finds a release that is already there.
 */
export const publishReleaseJob: JobHandler = async (stores, payload, job) => {
	const request = payloadSchema.parse(payload);
	const done = await findReleaseOfRevision(stores.db, request.revision);
	if (done) return { release: done.id, version: versionText(done) };

	const revision = await findApproved(stores, request.revision);
	const files = await renderFiles(stores, revision, request.record, (done) =>
		job.report({ done, total: RELEASE_FILE_NAMES.length, words: 'Rendering the release' })
	);
	if (!(await job.isCurrent())) return { release: null };
	return writeRelease(stores, request, files);
};

async function findApproved({ db }: Stores, id: number): Promise<FoundRevision> {
	const revision = await findRevisionById(db, id);
	if (revision === undefined) throw new Error(`there is no revision with id ${id}`);
	if (nextRevisionState(revision.state, 'publish') === undefined)
		throw new RefusalError(
			notApprovedAnymore(revision.number, REVISION_STATE_WORDS[revision.state])
		);
	if (sha256(revision.document) !== revision.sha256)
		throw new RefusalError(publishedDocumentDamaged());
	return revision;
}

async function renderFiles(
	{ storage }: Stores,
	{ document }: FoundRevision,
	record: PublicationRecord,
	report: (done: number) => void
): Promise<WrittenFile[]> {
	const files: WrittenFile[] = [];
	for (const name of RELEASE_FILE_NAMES) {
		report(files.length);
		const stored = await storage.put(await makeReleaseFile(name, document, record));
		files.push({ ...stored, name });
	}
	return files;
}

function writeRelease(
	{ db }: Stores,
	{ revision: id, record, previous, by }: Payload,
	files: readonly WrittenFile[]
): Promise<{ release: number; version: string }> {
	const at = new Date().toISOString();
	return write(db, async (tx) => {
		const done = await findReleaseOfRevision(tx, id);
		if (done) return { release: done.id, version: versionText(done) };
		const revision = await findRevisionById(tx, id);
		const state = revision && nextRevisionState(revision.state, 'publish');
		if (revision === undefined || state === undefined || record.version === null)
			throw new RefusalError(
				notApprovedAnymore(
					revision?.number ?? id,
					revision ? REVISION_STATE_WORDS[revision.state] : 'gone'
				)
			);

		const [inserted] = await tx
			.insert(release)
			.values({
				product: revision.product,
				...record.version,
				revision: id,
				previous,
				record,
				rendererVersion,
				state: 'scheduled',
				effectiveFrom: record.date,
				publishedBy: by,
				publishedAt: record.at
			})
			.returning({ id: release.id });
		if (inserted === undefined) throw new Error('the release was not written');
		for (const { name, key, sha256, byteSize } of files)
			await tx.insert(releaseFile).values({
				release: inserted.id,
				name,
				mediaType: RELEASE_FILES[name],
				sha256,
				byteSize,
				storageKey: key
			});
		await tx.update(revisionTable).set({ state }).where(eq(revisionTable.id, id));
		await tx.insert(decision).values({ revision: id, event: 'publish', by, at });
		const version = versionText(record.version);
		await appendAudit(tx, {
			action: 'release.publish',
			subject: `${revision.partNumber} ${version}`,
			by,
			details: {
				revision: revision.number,
				contentHash: revision.sha256,
				effectiveFrom: record.date,
				files: Object.fromEntries(files.map(({ name, sha256 }) => [name, sha256]))
			}
		});
		await settleProduct(tx, revision.product, at);
		return { release: inserted.id, version };
	});
}
