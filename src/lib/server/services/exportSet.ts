import { and, asc, eq } from 'drizzle-orm';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { deviceColumns, unpackMatrix } from '$lib/core/measurements/blocks';
import { exportHeader, exportLines } from '$lib/core/measurements/exportLines';
import type { Database } from '../db/database';
import { deviceBlock, sweepBlock } from '../db/schema';

const PIECE = 64 * 1024;

/**
 * The readings of a set as CSV, in pieces of text, one block in memory at a time. Numbers are those
 * of the uploaded file to the last digit, in its own unit.
 */
export async function* exportSet(db: Database, set: number): AsyncGenerator<string> {
	const keys = await db
		.select({
			conditionKey: sweepBlock.conditionKey,
			chunk: sweepBlock.chunk,
			gridHash: sweepBlock.gridHash,
			unitScale: sweepBlock.unitScale
		})
		.from(sweepBlock)
		.where(eq(sweepBlock.set, set))
		.orderBy(asc(sweepBlock.chunk), asc(sweepBlock.conditionKey));
	let piece = `${exportHeader(keys[0]?.unitScale ?? 1)}\n`;
	for (const { conditionKey, chunk, gridHash } of keys) {
		const block = await readBlock(db, { set, conditionKey, chunk, gridHash });
		for (const line of exportLines(block)) {
			piece += `${line}\n`;
			if (piece.length < PIECE) continue;
			yield piece;
			piece = '';
		}
	}
	yield piece;
}

async function readBlock(
	db: Database,
	key: {
		readonly set: number;
		readonly conditionKey: string;
		readonly chunk: number;
		readonly gridHash: string;
	}
) {
	const [found] = await db
		.select({ sweeps: sweepBlock, devices: deviceBlock.devices })
		.from(sweepBlock)
		.innerJoin(
			deviceBlock,
			and(eq(deviceBlock.set, sweepBlock.set), eq(deviceBlock.chunk, sweepBlock.chunk))
		)
		.where(
			and(
				eq(sweepBlock.set, key.set),
				eq(sweepBlock.quantity, 'capacitance'),
				eq(sweepBlock.conditionKey, key.conditionKey),
				eq(sweepBlock.gridHash, key.gridHash),
				eq(sweepBlock.chunk, key.chunk)
			)
		)
		.limit(1);
	if (found === undefined) throw new Error(`set ${key.set} has no block ${key.conditionKey}`);
	const { temperatureCelsius, frequency } = readConditionKey(key.conditionKey);
	return {
		temperatureCelsius,
		frequency: frequency ?? 0,
		devices: deviceColumns.parse(found.devices),
		biases: found.sweeps.grid,
		values: unpackMatrix(found.sweeps.values)
	};
}
