import { and, asc, eq, inArray } from 'drizzle-orm';
import type { SetDevices } from '$lib/core/distributions/indexDevices';
import type { SweepMatrix } from '$lib/core/distributions/conditionColumns';
import { CHUNK, deviceColumns, unpackMatrix } from '$lib/core/measurements/blocks';
import type { SweptQuantity } from '$lib/core/measurements/sweepTable';
import type { Database } from '../db/database';
import { deviceBlock, sweepBlock } from '../db/schema';

/** The devices of these sets, in the order of sets and chunks. */
export async function readDevices(db: Database, sets: readonly number[]): Promise<SetDevices[]> {
	const found: SetDevices[] = [];
	for (const set of sets) {
		const chunks = await db
			.select()
			.from(deviceBlock)
			.where(eq(deviceBlock.set, set))
			.orderBy(asc(deviceBlock.chunk));
		found.push({
			set,
			chunks: chunks.map(({ chunk, devices }) => ({ chunk, devices: deviceColumns.parse(devices) }))
		});
	}
	return found;
}

/** The temperatures and frequencies at which these sets hold sweeps of a quantity, as keys. */
export async function sweepConditions(
	db: Database,
	sets: readonly number[],
	quantity: SweptQuantity = 'capacitance'
): Promise<string[]> {
	if (sets.length === 0) return [];
	const found = await db
		.selectDistinct({ conditionKey: sweepBlock.conditionKey })
		.from(sweepBlock)
		.where(and(inArray(sweepBlock.set, [...sets]), eq(sweepBlock.quantity, quantity)));
	return found.map(({ conditionKey }) => conditionKey).sort();
}

/**
 * The matrices of a quantity at one temperature and frequency, one after the other, so that only one
 * block is in memory at a time. Currents have the sign of their bias, reverse positive.
 */
export async function* readSweeps(
	db: Database,
	sets: readonly number[],
	conditionKey: string,
	quantity: SweptQuantity = 'capacitance'
): AsyncGenerator<SweepMatrix> {
	for (const set of sets) {
		const isAtCondition = and(
			eq(sweepBlock.set, set),
			eq(sweepBlock.quantity, quantity),
			eq(sweepBlock.conditionKey, conditionKey)
		);
		const keys = await db
			.select({ gridHash: sweepBlock.gridHash, chunk: sweepBlock.chunk })
			.from(sweepBlock)
			.where(isAtCondition)
			.orderBy(asc(sweepBlock.chunk), asc(sweepBlock.gridHash));
		for (const { gridHash, chunk } of keys) {
			const [block] = await db
				.select()
				.from(sweepBlock)
				.where(and(isAtCondition, eq(sweepBlock.gridHash, gridHash), eq(sweepBlock.chunk, chunk)));
			if (block === undefined) continue;
			yield {
				set,
				firstRow: chunk * CHUNK,
				grid: block.grid,
				unitScale: block.unitScale,
				values: unpackMatrix(block.values)
			};
		}
	}
}
