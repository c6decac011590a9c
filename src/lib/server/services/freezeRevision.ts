import { eq, max } from 'drizzle-orm';
import { canonicalBytes } from '$lib/core/datasheet/canonicalBytes';
import type { Resolved } from '$lib/core/datasheet/resolveInput';
import { nothingChangedSinceRelease, revisionAlreadyOpen } from '$lib/core/messages/review';
import { sheetEvidence } from '$lib/core/review/sheetEvidence';
import { sheetRows, type StruckOutPlace } from '$lib/core/review/sheetRows';
import { REVISION_STATE_WORDS } from '$lib/core/review/states';
import type { VerificationEvidence } from '$lib/core/review/verificationEvidence';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { findOpenRevision } from '../db/findOpenRevision';
import { findPreviousRelease } from '../db/findPreviousRelease';
import { listEditors } from '../db/listEditors';
import { decision, revision, verificationRow } from '../db/schema';
import { write } from '../db/write';
import { enqueue } from '../work/enqueue';
import type { Stores } from '../work/stores';
import { EvidenceSource } from './evidenceSource';
import { gatherEvidence, hasLimitBehind } from './gatherEvidence';
import { sha256 } from './sha256';

/** More packed values than this are read by a job, so that nobody waits for an answer. */
const INLINE_BYTES = 2_000_000;

export type SubmitOutcome =
	| {
			readonly status: 'submitted';
			readonly revision: { readonly id: number; readonly number: number };
			/** The job that gathers the evidence, where it takes one. */
			readonly job: number | null;
	  }
	| { readonly status: 'refused'; readonly problems: readonly string[] };

const refused = (...problems: string[]): SubmitOutcome => ({ status: 'refused', problems });

/**
 * Freezes a resolved draft as a revision to verify:
 *
 *   canonical bytes and hash → rows with evidence → one transaction writes them all
 */
export async function freezeRevision(
	{ db }: Pick<Stores, 'db'>,
	{
		product,
		resolved,
		by
	}: {
		readonly product: { readonly id: number; readonly partNumber: string };
		readonly resolved: Pick<Resolved, 'document' | 'slots' | 'problems'>;
		readonly by: string;
	}
): Promise<SubmitOutcome> {
	const at = new Date().toISOString();
	const open = await findOpenRevision(db, product.id);
	const problems = [
		...(open ? [revisionAlreadyOpen(open.number, REVISION_STATE_WORDS[open.state])] : []),
		...resolved.problems.map(({ label, message }) => `${label}: ${message}`)
	];
	if (problems.length > 0) return { status: 'refused', problems };

	const bytes = Buffer.from(canonicalBytes(resolved.document));
	const hash = sha256(bytes);
	const previous = await findPreviousRelease(db, product.id);
	if (previous?.sha256 === hash) return refused(nothingChangedSinceRelease(previous.version));

	const rows = sheetRows(resolved.document, struckOutPlaces(resolved));
	const source = new EvidenceSource(db, product.id);
	const isLong = (await source.byteSize()) > INLINE_BYTES;
	const evidence: { row: string; evidence: VerificationEvidence }[] = [];
	for (const row of rows) {
		const computed =
			isLong && hasLimitBehind(row)
				? { status: 'pending' as const }
				: await gatherEvidence(source, row);
		evidence.push({ row: row.row, evidence: sheetEvidence(row, computed, previous) });
	}

	return write(db, async (tx): Promise<SubmitOutcome> => {
		const raced = await findOpenRevision(tx, product.id);
		if (raced) return refused(revisionAlreadyOpen(raced.number, REVISION_STATE_WORDS[raced.state]));
		const submitted = await insertRevision(tx, {
			product: product.id,
			document: bytes,
			sha256: hash,
			submittedBy: by,
			submittedAt: at,
			editors: await listEditors(tx, product.id)
		});
		if (evidence.length > 0)
			await tx.insert(verificationRow).values(
				evidence.map((row, position) => ({
					revision: submitted.id,
					position,
					state: 'open' as const,
					...row
				}))
			);
		await tx.insert(decision).values({ revision: submitted.id, event: 'submit', by, at });
		const job = isLong
			? await enqueue(tx, {
					kind: 'verify-evidence',
					payload: { revision: submitted.id },
					dedupeKey: `verify-evidence:${submitted.id}`,
					by
				})
			: null;
		await appendAudit(tx, {
			action: 'revision.submit',
			subject: `${product.partNumber} revision ${submitted.number}`,
			by,
			details: { sha256: hash, rows: evidence.length, status: resolved.document.status }
		});
		return { status: 'submitted', revision: submitted, job };
	});
}

async function insertRevision(
	tx: Database,
	values: Omit<typeof revision.$inferInsert, 'number' | 'state'>
): Promise<{ id: number; number: number }> {
	const [newest] = await tx
		.select({ number: max(revision.number) })
		.from(revision)
		.where(eq(revision.product, values.product));
	const number = (newest?.number ?? 0) + 1;
	const [inserted] = await tx
		.insert(revision)
		.values({ ...values, number, state: 'inReview' })
		.returning({ id: revision.id });
	if (inserted === undefined) throw new Error('the revision was not written');
	return { id: inserted.id, number };
}

function struckOutPlaces({ slots }: Pick<Resolved, 'slots'>): StruckOutPlace[] {
	return slots.flatMap(({ id, label, state, binding }) =>
		state === 'struck out' && binding?.kind === 'struck-out'
			? [{ id, label, by: binding.by, reason: binding.reason }]
			: []
	);
}
