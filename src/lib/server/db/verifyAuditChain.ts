import { asc, gt } from 'drizzle-orm';
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

/** Few enough that the event loop is free again after a few milliseconds. */
const ROWS_AT_ONCE = 500;

/**
 * Recomputes every hash of the trail. A row that was changed, put in or taken out between others
 * breaks the chain there; a head kept elsewhere shows that the newest row was taken away.
 *
 * @param known the head as it was last seen outside the database
 */
export async function verifyAuditChain(db: Database, known?: AuditHead): Promise<AuditChain> {
	let head: AuditHead | undefined;
	let hasKnown = known === undefined;
	let count = 0;
	for (;;) {
		const rows = await db
			.select()
			.from(audit)
			.where(gt(audit.seq, head?.seq ?? 0))
			.orderBy(asc(audit.seq))
			.limit(ROWS_AT_ONCE);
		for (const row of rows) {
			const prevHash = head?.hash ?? CHAIN_START;
			if (row.prevHash !== prevHash || row.hash !== auditHash(prevHash, row))
				return { status: 'broken', seq: row.seq };
			if (row.seq === known?.seq && row.hash === known.hash) hasKnown = true;
			head = { seq: row.seq, hash: row.hash };
		}
		count += rows.length;
		if (rows.length < ROWS_AT_ONCE) break;
		await new Promise((next) => setImmediate(next));
	}
	if (known !== undefined && !hasKnown) return { status: 'broken', seq: known.seq };
	return { status: 'whole', rows: count, head };
}
