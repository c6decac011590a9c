import { CHUNK, packMatrix } from '$lib/core/measurements/blocks';
import type { Suspect } from '$lib/core/measurements/suspects';
import type { SweepTable } from '$lib/core/measurements/sweepTable';
import { measurementMessages } from '$lib/core/messages/measurements';
import type { Connection } from '../db/database';
import type { FoundUpload } from '../db/findUpload';
import { deviceBlock, measurementSet, suspect, sweepBlock } from '../db/schema';
import { write } from '../db/write';
import type { JobContext } from '../work/jobHandler';
import { sha256 } from './sha256';

/** Suspects of one transaction. */
const SUSPECTS_A_WRITE = 100;

/** Opens a set that nobody sees until it is accepted; answers its id. */
export async function openStagedSet(
	db: Connection,
	{ upload, by }: { readonly upload: FoundUpload; readonly by: string }
): Promise<number> {
	const [created] = await write(db, (tx) =>
		tx
			.insert(measurementSet)
			.values({
				product: upload.product,
				upload: upload.id,
				setup: upload.confirmed?.setup,
				uncertainty: upload.confirmed?.setup.uncertainty ?? null,
				state: 'importing',
				acceptedBy: by,
				acceptedAt: new Date().toISOString()
			})
			.returning({ id: measurementSet.id })
	);
	if (created === undefined) throw new Error('the measurement set was not stored');
	return created.id;
}

/** Stores devices and matrices, one block a transaction: half a megabyte takes about 5 ms. */
export async function stageBlocks(
	db: Connection,
	input: {
		readonly set: number;
		readonly table: SweepTable;
		readonly unitScale: number;
		readonly job: JobContext;
	}
): Promise<void> {
	const { set, table, unitScale, job } = input;
	const { devices } = table;
	const conditions = table.conditions();
	const chunks = Math.ceil(table.deviceCount / CHUNK);
	for (let chunk = 0; chunk < chunks; chunk++) {
		const [from, to] = [chunk * CHUNK, (chunk + 1) * CHUNK];
		const columns = {
			lot: devices.lot.slice(from, to),
			wafer: devices.wafer.slice(from, to),
			site: devices.site.slice(from, to),
			element: devices.element.slice(from, to),
			name: devices.name.slice(from, to)
		};
		await write(db, (tx) => tx.insert(deviceBlock).values({ set, chunk, devices: columns }));
		job.report({ done: chunk, total: chunks, words: measurementMessages.storing() });
		for (const condition of conditions) {
			const values = condition.matrix(chunk, columns.lot.length);
			if (values === undefined) continue;
			await write(db, (tx) =>
				tx.insert(sweepBlock).values({
					set,
					quantity: 'capacitance',
					conditionKey: condition.key,
					chunk,
					gridHash: sha256(JSON.stringify(condition.biases)),
					grid: condition.biases,
					unitScale,
					values: Buffer.from(packMatrix(values).buffer)
				})
			);
		}
	}
}

export async function stageSuspects(
	db: Connection,
	set: number,
	suspects: readonly Suspect[]
): Promise<void> {
	for (let first = 0; first < suspects.length; first += SUSPECTS_A_WRITE) {
		const rows = suspects.slice(first, first + SUSPECTS_A_WRITE);
		await write(db, (tx) => tx.insert(suspect).values(rows.map((row) => ({ set, ...row }))));
	}
}
