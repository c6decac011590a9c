import { measurementMessages } from '$lib/core/messages/measurements';
import { appendAudit } from '../db/appendAudit';
import { findMeasurementSet } from '../db/findMeasurementSet';
import { listSuspects } from '../db/listSuspects';
import { verdict } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { enqueueDistributions } from './enqueueDistributions';

export type VerdictOutcome =
	| { readonly status: 'given'; readonly job: number }
	| { readonly status: 'refused'; readonly message: string };

/**
 * Keeps or excludes a suspect sweep, with the reason. Verdicts are only ever added: the newest one
 * holds, and an earlier one is undone by a further one.
 */
export async function giveVerdict(
	{ db }: Pick<Stores, 'db'>,
	input: {
		readonly set: number;
		/** Index over the set. */
		readonly device: number;
		readonly conditionKey: string;
		readonly decision: 'keep' | 'exclude';
		readonly reason: string;
		readonly by: string;
	}
): Promise<VerdictOutcome> {
	const { set, device, conditionKey, decision, by } = input;
	const reason = input.reason.trim();
	if (reason === '') return refused(measurementMessages.reasonNeeded());
	const at = new Date().toISOString();
	return write(db, async (tx) => {
		const found = await findMeasurementSet(tx, set);
		if (found === undefined) return refused(measurementMessages.setNotFound(set));
		const suspects = await listSuspects(tx, set);
		const sweep = suspects.find(
			(entry) => entry.device === device && entry.conditionKey === conditionKey
		);
		if (sweep === undefined) return refused(measurementMessages.notSuspect());
		if (sweep.verdicts.at(-1)?.decision === decision) {
			return refused(measurementMessages.verdictUnchanged(decision));
		}

		await tx.insert(verdict).values({ set, device, conditionKey, decision, reason, by, at });
		await appendAudit(tx, {
			action: `verdict.${decision}`,
			subject: `${found.partNumber} set ${set}, ${sweep.lot} ${sweep.wafer} ${sweep.name}`,
			by,
			details: { device, conditionKey, reason }
		});
		return { status: 'given', job: await enqueueDistributions(tx, found.product, by) };
	});
}

function refused(message: string): VerdictOutcome {
	return { status: 'refused', message };
}
