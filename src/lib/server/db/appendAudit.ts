import { createHash } from 'node:crypto';
import { desc } from 'drizzle-orm';
import type { Database } from './database';
import { audit } from './schema';

/** What the chain starts from. */
export const CHAIN_START = '0'.repeat(64);

export interface AuditEntry {
	/** What was done, as `revision.submit`. */
	readonly action: string;
	/** To what, in words a person reads: `LKT-1130 revision 3`. */
	readonly subject: string;
	/** Who did it; `null` for what the server does by itself. */
	readonly by: string | null;
	readonly details?: Readonly<Record<string, unknown>>;
}

/** The hash of a row: of the row before and of everything this one says. */
export function auditHash(
	prevHash: string,
	entry: { readonly at: string; readonly details: unknown } & Omit<AuditEntry, 'details'>
): string {
	const said = JSON.stringify([
		prevHash,
		entry.at,
		entry.by,
		entry.action,
		entry.subject,
		entry.details
	]);
	return createHash('sha256').update(said).digest('hex');
}

/** Appends to the audit trail, in the transaction of the use case it speaks of. */
export async function appendAudit(tx: Database, entry: AuditEntry): Promise<void> {
	const [head] = await tx
		.select({ hash: audit.hash })
		.from(audit)
		.orderBy(desc(audit.seq))
		.limit(1);
	const prevHash = head?.hash ?? CHAIN_START;
	const row = { ...entry, details: entry.details ?? {}, at: new Date().toISOString() };
	await tx.insert(audit).values({ ...row, prevHash, hash: auditHash(prevHash, row) });
}
