import { and, eq, isNull } from 'drizzle-orm';
import { appendAudit } from '../db/appendAudit';
import { apiToken } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

/** Revokes one's own token; somebody else's is left as it is. Answers whether one was revoked. */
export function revokeToken(
	{ db }: Pick<Stores, 'db'>,
	{ token, by }: { readonly token: number; readonly by: string }
): Promise<boolean> {
	return write(db, async (tx) => {
		const [revoked] = await tx
			.update(apiToken)
			.set({ revokedAt: new Date().toISOString() })
			.where(and(eq(apiToken.id, token), eq(apiToken.person, by), isNull(apiToken.revokedAt)))
			.returning({ name: apiToken.name });
		if (revoked === undefined) return false;
		await appendAudit(tx, { action: 'token.revoke', subject: revoked.name, by });
		return true;
	});
}
