import { sql } from 'drizzle-orm';
import type { Database } from './database';
import { suspect, verdict } from './schema';

/** Sweeps of a set that wait for a verdict. */
export async function countOpenSuspects(db: Database, set: number): Promise<number> {
	const [row] = await db.all<{ open: number }>(sql`
		select count(distinct ${suspect.device} || ' ' || ${suspect.conditionKey}) as open
		from ${suspect} where ${suspect.set} = ${set} and not exists (
			select 1 from ${verdict} where ${verdict.set} = ${suspect.set}
				and ${verdict.device} = ${suspect.device}
				and ${verdict.conditionKey} = ${suspect.conditionKey})`);
	return row?.open ?? 0;
}
