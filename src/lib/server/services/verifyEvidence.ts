import { and, eq } from 'drizzle-orm';
import { z } from 'zod';
import { readDocument } from '$lib/core/datasheet/readDocument';
import { sheetEvidence } from '$lib/core/review/sheetEvidence';
import { sheetRows } from '$lib/core/review/sheetRows';
import { findPreviousRelease } from '../db/findPreviousRelease';
import { findRevisionById } from '../db/findRevision';
import { listVerificationRows } from '../db/listVerificationRows';
import { verificationRow } from '../db/schema';
import { write } from '../db/write';
import type { JobHandler } from '../work/jobHandler';
import { EvidenceSource } from './evidenceSource';
import { gatherEvidence } from './gatherEvidence';

const payloadSchema = z.object({ revision: z.number().int() });

/** The job that recomputes the rows of a submitted revision from large blocks, row by row. */
export const verifyEvidence: JobHandler = async ({ db }, payload, job) => {
	const { revision: id } = payloadSchema.parse(payload);
	const revision = await findRevisionById(db, id);
	if (revision?.state !== 'inReview') return { rows: 0 };

	const stored = await listVerificationRows(db, id);
	const pending = new Set(
		stored.filter(({ evidence }) => evidence.risk === 'pending').map(({ row }) => row)
	);
	const rows = sheetRows(readDocument(revision.document), []).filter(({ row }) => pending.has(row));
	const previous = await findPreviousRelease(db, revision.product);
	const source = new EvidenceSource(db, revision.product);

	for (const [done, row] of rows.entries()) {
		job.report({ done, total: rows.length, words: 'Recomputing rows by the second route' });
		const computed = await gatherEvidence(source, row);
		if (!(await job.isCurrent())) return { rows: done };
		const evidence = sheetEvidence(row, computed, previous);
		await write(db, (tx) =>
			tx
				.update(verificationRow)
				.set({ evidence })
				.where(and(eq(verificationRow.revision, id), eq(verificationRow.row, row.row)))
		);
	}
	return { rows: rows.length };
};
