import { and, eq } from 'drizzle-orm';
import {
	evidenceNotReady,
	flagNeedsComment,
	revisionIsNot,
	rowNotFound
} from '$lib/core/messages/review';
import { mayVerify } from '$lib/core/review/separation';
import { REVISION_STATE_WORDS } from '$lib/core/review/states';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { findActor } from '../db/findActor';
import { findHands } from '../db/findHands';
import { findRevisionById, type FoundRevision } from '../db/findRevision';
import { listVerificationRows } from '../db/listVerificationRows';
import { comment, verificationRow } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

export type VerifyOutcome =
	| { readonly status: 'verified'; readonly rows: number }
	| { readonly status: 'refused'; readonly message: string };

const refused = (message: string): VerifyOutcome => ({ status: 'refused', message });

const STATES = { tick: 'ticked', flag: 'flagged', clear: 'open' } as const;
export type RowVerdict = keyof typeof STATES;

/** Ticks, flags or reopens one row of a verification sheet. A flag says what is wrong. */
export async function verifyRow(
	{ db }: Pick<Stores, 'db'>,
	input: {
		readonly revision: number;
		readonly row: string;
		readonly verdict: RowVerdict;
		/** Needed with a flag. */
		readonly text?: string;
		readonly by: string;
	}
): Promise<VerifyOutcome> {
	const at = new Date().toISOString();
	const text = input.text?.trim() ?? '';
	if (input.verdict === 'flag' && text === '') return refused(flagNeedsComment());
	return write(db, async (tx) => {
		const revision = await openToVerify(tx, input.revision, input.by);
		if ('status' in revision) return revision;
		const rows = await listVerificationRows(tx, revision.id);
		const row = rows.find((entry) => entry.row === input.row);
		if (row === undefined) return refused(rowNotFound(input.row));
		if (input.verdict === 'tick' && row.evidence.risk === 'pending')
			return refused(evidenceNotReady());

		await setState(tx, revision, input.row, { state: STATES[input.verdict], by: input.by, at });
		if (text !== '')
			await tx
				.insert(comment)
				.values({ revision: revision.id, row: input.row, text, by: input.by, at });
		await appendAudit(tx, {
			action: `row.${input.verdict}`,
			subject: `${revision.partNumber} revision ${revision.number}`,
			by: input.by,
			details: { row: input.row, ...(text === '' ? {} : { text }) }
		});
		return { status: 'verified', rows: 1 };
	});
}

/** Ticks every open row of low risk at once; the others are left for a person to look at singly. */
export async function tickLowRisk(
	{ db }: Pick<Stores, 'db'>,
	input: { readonly revision: number; readonly by: string }
): Promise<VerifyOutcome> {
	const at = new Date().toISOString();
	return write(db, async (tx) => {
		const revision = await openToVerify(tx, input.revision, input.by);
		if ('status' in revision) return revision;
		const rows = (await listVerificationRows(tx, revision.id)).filter(
			({ state, evidence }) => state === 'open' && evidence.risk === 'low'
		);
		for (const { row } of rows)
			await setState(tx, revision, row, { state: 'ticked', by: input.by, at });
		if (rows.length > 0)
			await appendAudit(tx, {
				action: 'row.tickLowRisk',
				subject: `${revision.partNumber} revision ${revision.number}`,
				by: input.by,
				details: { rows: rows.map(({ row }) => row) }
			});
		return { status: 'verified', rows: rows.length };
	});
}

type OpenRevision = Pick<FoundRevision, 'id' | 'number' | 'partNumber'>;

async function openToVerify(
	tx: Database,
	id: number,
	by: string
): Promise<OpenRevision | Extract<VerifyOutcome, { status: 'refused' }>> {
	const revision = await findRevisionById(tx, id);
	if (revision === undefined) throw new Error(`there is no revision with id ${id}`);
	if (revision.state !== 'inReview')
		return {
			status: 'refused',
			message: revisionIsNot(revision.number, 'verified', REVISION_STATE_WORDS[revision.state])
		};
	const allowance = mayVerify(await findActor(tx, by), await findHands(tx, revision));
	return allowance.permitted ? revision : { status: 'refused', message: allowance.reason };
}

function setState(
	tx: Database,
	{ id }: OpenRevision,
	row: string,
	values: {
		readonly state: 'open' | 'ticked' | 'flagged';
		readonly by: string;
		readonly at: string;
	}
) {
	return tx
		.update(verificationRow)
		.set(values.state === 'open' ? { state: 'open', by: null, at: null } : values)
		.where(and(eq(verificationRow.revision, id), eq(verificationRow.row, row)));
}
