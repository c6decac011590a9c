import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { DatasheetDocument } from '$lib/core/datasheet/document';
import type { LimitRow } from '$lib/core/limits/limit';
import type { Stores } from '$lib/server/work/stores';
import { listPolicies } from '$lib/server/db/findPolicies';
import { listVerificationRows } from '$lib/server/db/listVerificationRows';
import { job } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { capacitanceTable } from '$lib/server/services/capacitanceTable';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { decideRevision } from '$lib/server/services/decideRevision';
import { ensurePolicies } from '$lib/server/services/ensurePolicies';
import { freezeRevision } from '$lib/server/services/freezeRevision';
import { verifyRow } from '$lib/server/services/verifyRow';
import { folderStorage } from '$lib/server/storage/folderStorage';
import { ENGINEER, insertAcceptedSet, insertProduct } from './acceptedSet';
import { insertReviewPeople } from './reviewPeople';
import { sampleDocument } from './sampleDocument';
import { openTestDatabase } from './testDatabase';

export const BIASES = [1, 4, 15];
export const PART = 'LKT-1130';
const LOTS = ['LK26-011', 'LK26-014', 'LK26-019'];

/** A linear congruential generator: the same devices in every run. */
function* pseudoRandom(seed: number): Generator<number> {
	for (let state = seed; ;) {
		state = (state * 1_103_515_245 + 12_345) % 2 ** 31;
		yield state / 2 ** 31;
	}
}

const devices = LOTS.flatMap((lot) =>
	Array.from({ length: 100 }, (_, i) => ({
		lot,
		wafer: `0${1 + Math.floor(i / 25)}`,
		name: String(i + 1)
	}))
);

/** Nearly normal spread of 2 %: the sum of twelve uniform numbers. In pF, three decimals. */
function sweeps(): Float64Array {
	const random = pseudoRandom(20260105);
	const uniform = () => Number(random.next().value);
	return Float64Array.from(
		devices.flatMap(() => {
			const spread = Array.from({ length: 12 }, uniform).reduce((sum, u) => sum + u, -6);
			return BIASES.map((bias) =>
				Number((40 * (1 + bias / 2) ** -1.1 * Math.exp(0.02 * spread)).toFixed(3))
			);
		})
	);
}

export interface ReviewBench {
	readonly stores: Stores;
	readonly folder: string;
	readonly product: { readonly id: number; readonly partNumber: string };
	/** What the engine says now, as the draft would bind it. */
	limitRows(): Promise<LimitRow[]>;
	close(): void;
}

/** A measured product, its people and policies, in a database and a folder of their own. */
export async function openReviewBench(): Promise<ReviewBench> {
	const opened = await openTestDatabase();
	const folder = mkdtempSync(join(tmpdir(), 'platen-files-'));
	const stores = { db: opened.db, storage: folderStorage(folder) };
	const id = await insertProduct(opened.db, PART);
	await insertReviewPeople(opened.db);
	await ensurePolicies(stores);
	await insertAcceptedSet(opened.db, {
		product: id,
		sha256: '5'.repeat(64),
		uncertainty: 0.003,
		devices,
		biases: BIASES,
		frequency: 1e6,
		picofarads: new Map([[25, sweeps()]])
	});
	await computeDistributions(
		stores,
		{ product: id },
		{ id: 1, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
	);
	// What the distributions ask for next has no part in a review.
	await write(opened.db, (tx) => tx.delete(job));
	return {
		stores,
		folder,
		product: { id, partNumber: PART },
		async limitRows() {
			const policy = (await listPolicies(opened.db)).find(({ rules }) => rules.method === 'normal');
			const table = await capacitanceTable(opened.db, {
				product: id,
				temperatureCelsius: 25,
				frequency: 1e6,
				biases: BIASES,
				policyVersion: policy?.id ?? 0
			});
			if ('status' in table) throw new Error(table.message);
			return table.rows;
		},
		close() {
			opened.close();
			rmSync(folder, { recursive: true, force: true });
		}
	};
}

const printed = (value: { text: string; printed: number } | null) =>
	value && { text: value.text, value: value.printed };

/** The sample document with these limits as its only capacitance table. */
export function documentOf(
	rows: readonly LimitRow[],
	changes: Partial<DatasheetDocument> = {}
): DatasheetDocument {
	const base = sampleDocument();
	return {
		...base,
		sections: base.sections
			.filter(({ kind }) => kind !== 'characteristics' && kind !== 'capacitance-chart')
			.map((section) =>
				section.kind === 'capacitance-table'
					? {
							...section,
							ratioTo: null,
							rows: rows.map((row) => ({
								id: `capacitance.25c.VR=${row.condition.reverseVoltage}`,
								slot: 'capacitance.25c',
								state: 'bound' as const,
								trace: row.inputHash,
								bias: {
									text: String(row.condition.reverseVoltage),
									value: row.condition.reverseVoltage ?? 0
								},
								minimum: printed(row.minimum),
								typical: printed(row.typical),
								maximum: printed(row.maximum),
								deviationMinimum: null,
								deviationMaximum: null,
								ratio: null,
								basis: row.basis
							}))
						}
					: section
			),
		...changes
	};
}

/** Submits a document as the engineer; throws when it is refused. */
export async function submit(
	bench: ReviewBench,
	document: DatasheetDocument,
	by: string = ENGINEER
): Promise<number> {
	const outcome = await freezeRevision(bench.stores, {
		product: bench.product,
		resolved: { document, slots: [], problems: [] },
		by
	});
	if (outcome.status === 'refused') throw new Error(outcome.problems.join(' '));
	return outcome.revision.id;
}

/** Ticks every row and approves, as the applications engineer; throws when either is refused. */
export async function approve(bench: ReviewBench, revision: number): Promise<void> {
	for (const { row } of await listVerificationRows(bench.stores.db, revision)) {
		const ticked = await verifyRow(bench.stores, { revision, row, verdict: 'tick', by: 'tomas' });
		if (ticked.status === 'refused') throw new Error(ticked.message);
	}
	const decided = await decideRevision(bench.stores, {
		revision,
		decision: 'approve',
		by: 'tomas'
	});
	if (decided.status === 'refused') throw new Error(decided.message);
}
