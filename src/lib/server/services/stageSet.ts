import { CHUNK, packFlags, packMatrix } from '$lib/core/measurements/blocks';
import type { DeviceColumns } from '$lib/core/measurements/blocks';
import type { ReadingTable } from '$lib/core/measurements/readingTable';
import type { Suspect } from '$lib/core/measurements/suspects';
import type { SweepTable } from '$lib/core/measurements/sweepTable';
import { measurementMessages } from '$lib/core/messages/measurements';
import type { Connection } from '../db/database';
import type { FoundUpload } from '../db/findUpload';
import { deviceBlock, measurementSet, readingBlock, suspect, sweepBlock } from '../db/schema';
import { write } from '../db/write';
import type { JobContext } from '../work/jobHandler';
import { sha256 } from './sha256';

/** Blocks of readings of one transaction; one holds 18 kB at most. */
const READINGS_A_WRITE = 16;
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
		const rows = await stageDevices(db, { set, chunk, devices });
		job.report({ done: chunk, total: chunks, words: measurementMessages.storing() });
		for (const condition of conditions) {
			const values = condition.matrix(chunk, rows);
			if (values === undefined) continue;
			await write(db, (tx) =>
				tx.insert(sweepBlock).values({
					set,
					quantity: table.quantity,
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

/** Stores devices and single readings, some blocks a transaction. */
export async function stageReadings(
	db: Connection,
	input: { readonly set: number; readonly table: ReadingTable; readonly job: JobContext }
): Promise<void> {
	const { set, table, job } = input;
	const series = table.series();
	const chunks = Math.ceil(table.devices.count / CHUNK);
	for (let chunk = 0; chunk < chunks; chunk++) {
		const rows = await stageDevices(db, { set, chunk, devices: table.devices.columns });
		job.report({ done: chunk, total: chunks, words: measurementMessages.storingReadings() });
		const blocks = series.flatMap((of) =>
			Array.from({ length: of.repeats }, (_, repeat) => {
				const block = of.block(repeat, chunk, rows);
				return (
					block && {
						set,
						characteristic: of.characteristic.key,
						conditionKey: of.key,
						repeat,
						chunk,
						unitScale: of.unit.scale,
						values: Buffer.from(packMatrix(block.values).buffer),
						censored: Buffer.from(packFlags(block.censored).buffer)
					}
				);
			}).filter((block) => block !== undefined)
		);
		for (let first = 0; first < blocks.length; first += READINGS_A_WRITE) {
			const some = blocks.slice(first, first + READINGS_A_WRITE);
			await write(db, (tx) => tx.insert(readingBlock).values(some));
		}
	}
}

/** Stores who the devices of a chunk are; answers how many. */
async function stageDevices(
	db: Connection,
	{
		set,
		chunk,
		devices
	}: { readonly set: number; readonly chunk: number; readonly devices: DeviceColumns }
): Promise<number> {
	const [from, to] = [chunk * CHUNK, (chunk + 1) * CHUNK];
	const columns = {
		lot: devices.lot.slice(from, to),
		wafer: devices.wafer.slice(from, to),
		site: devices.site.slice(from, to),
		element: devices.element.slice(from, to),
		name: devices.name.slice(from, to)
	};
	await write(db, (tx) => tx.insert(deviceBlock).values({ set, chunk, devices: columns }));
	return columns.lot.length;
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
