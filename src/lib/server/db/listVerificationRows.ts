import { asc, eq } from 'drizzle-orm';
import { verificationEvidence } from '$lib/core/review/verificationEvidence';
import type { Database } from './database';
import { person, verificationRow } from './schema';

export type VerificationRow = Awaited<ReturnType<typeof listVerificationRows>>[number];

/** The rows of a verification sheet in their order, with who ticked or flagged them. */
export async function listVerificationRows(db: Database, revision: number) {
	const rows = await db
		.select({
			row: verificationRow.row,
			position: verificationRow.position,
			state: verificationRow.state,
			at: verificationRow.at,
			by: verificationRow.by,
			byName: person.name,
			evidence: verificationRow.evidence
		})
		.from(verificationRow)
		.leftJoin(person, eq(verificationRow.by, person.id))
		.where(eq(verificationRow.revision, revision))
		.orderBy(asc(verificationRow.position));
	return rows.map((row) => ({ ...row, evidence: verificationEvidence.parse(row.evidence) }));
}
