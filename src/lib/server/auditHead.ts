import { readFile, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { desc } from 'drizzle-orm';
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

/** Keeps the newest audit row's number and hash outside the database. Never goes back. */
export async function keepAuditHead(db: Database, dataDir: string): Promise<void> {
	const [newest] = await db
		.select({ seq: audit.seq, hash: audit.hash })
		.from(audit)
		.orderBy(desc(audit.seq))
		.limit(1);
	const known = await readAuditHead(dataDir);
	if (newest === undefined || newest.seq <= (known?.seq ?? 0)) return;
	const aside = `${pathIn(dataDir)}.${process.pid}`;
	await writeFile(aside, JSON.stringify(newest));
	await rename(aside, pathIn(dataDir));
}
