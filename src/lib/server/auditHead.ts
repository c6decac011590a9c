import { randomUUID } from 'node:crypto';
import { readFile, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { and, desc, eq } from 'drizzle-orm';
import { z } from 'zod';
import type { Database } from './db/database';
import { audit } from './db/schema';
import type { AuditHead } from './db/verifyAuditChain';

const auditHead = z.object({ seq: z.number().int(), hash: z.string() });
const pathIn = (dataDir: string) => join(dataDir, 'audit-head.json');

/** The newest audit row as it was last seen, from outside the database; `undefined` before the first. */
export async function readAuditHead(dataDir: string): Promise<AuditHead | undefined> {
	const text = await readFile(pathIn(dataDir), 'utf8').catch(() => undefined);
	return text === undefined ? undefined : auditHead.parse(JSON.parse(text));
}

/**
 * Keeps the newest audit row's number and hash outside the database. Never goes back, and stays
 * where it is once the row it knows is gone: newer rows must not cover up that one was taken away.
 */
export async function keepAuditHead(db: Database, dataDir: string): Promise<void> {
	const [newest] = await db
		.select({ seq: audit.seq, hash: audit.hash })
		.from(audit)
		.orderBy(desc(audit.seq))
		.limit(1);
	const known = await readAuditHead(dataDir);
	if (newest === undefined || newest.seq <= (known?.seq ?? 0)) return;
	if (known !== undefined && !(await isThere(db, known))) return;
	const aside = `${pathIn(dataDir)}.${randomUUID()}`;
	await writeFile(aside, JSON.stringify(newest));
	await rename(aside, pathIn(dataDir));
}

async function isThere(db: Database, { seq, hash }: AuditHead): Promise<boolean> {
	const [found] = await db
		.select({ seq: audit.seq })
		.from(audit)
		.where(and(eq(audit.seq, seq), eq(audit.hash, hash)))
		.limit(1);
	return found !== undefined;
}
