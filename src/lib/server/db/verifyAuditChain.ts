import { asc } from 'drizzle-orm';
import { CHAIN_START, auditHash } from './appendAudit';
import type { Database } from './database';
import { audit } from './schema';

export type AuditChain =
	| { readonly status: 'whole'; readonly rows: number; readonly head: AuditHead | undefined }
	| { readonly status: 'broken'; readonly seq: number };

export interface AuditHead {
	readonly seq: number;
	readonly hash: string;
}

/**
 * Recomputes every hash of the trail. A row that was changed, put in or taken out between others
 * breaks the chain there; a head kept elsewhere shows that the newest row was taken away.
 *
 * @param known the head as it was last seen outside the database
 */
export async function verifyAuditChain(db: Database, known?: AuditHead): Promise<AuditChain> {
	const rows = await db.select().from(audit).orderBy(asc(audit.seq));
	let prevHash = CHAIN_START;
	for (const row of rows) {
		if (row.prevHash !== prevHash || row.hash !== auditHash(prevHash, row)) {
			return { status: 'broken', seq: row.seq };
		}
		prevHash = row.hash;
	}
	if (
		known !== undefined &&
		!rows.some(({ seq, hash }) => seq === known.seq && hash === known.hash)
	) {
		return { status: 'broken', seq: known.seq };
	}
	return { status: 'whole', rows: rows.length, head: rows.at(-1) };
}
