import { newToken, tokenHash } from '../auth/tokens';
import { appendAudit } from '../db/appendAudit';
import { apiToken } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

export interface NewToken {
	readonly person: string;
	/** What it is for, in its owner's words. */
	readonly name: string;
}

/** A personal access token, shown this once: only its hash is kept. */
export async function createToken(
	{ db }: Pick<Stores, 'db'>,
	{ person, name }: NewToken
): Promise<string> {
	const token = newToken();
	await write(db, async (tx) => {
		await tx
			.insert(apiToken)
			.values({ person, name, hash: tokenHash(token), createdAt: new Date().toISOString() });
		await appendAudit(tx, { action: 'token.create', subject: name, by: person });
	});
	return token;
}
