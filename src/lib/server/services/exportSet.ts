import { and, asc, eq } from 'drizzle-orm';
import { findCharacteristic } from '$lib/core/characteristics/catalogue';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { deviceColumns, unpackFlags, unpackMatrix } from '$lib/core/measurements/blocks';
import { exportHeader, exportLines } from '$lib/core/measurements/exportLines';
import { exportReadings, READINGS_HEADER } from '$lib/core/measurements/exportReadings';
import { readingKind } from '$lib/core/measurements/readingUnits';
import type { SweptQuantity } from '$lib/core/measurements/sweepTable';
import { findUnitOfSize } from '$lib/core/units/unit';
import type { Database } from '../db/database';
import { deviceBlock, readingBlock, sweepBlock } from '../db/schema';

const PIECE = 64 * 1024;

/**
 * The readings of a set as CSV, in pieces of text, one block in memory at a time. Numbers are those
 * of the uploaded file to the last digit, in its own unit.
 */
export async function* exportSet(db: Database, set: number): AsyncGenerator<string> {
	let piece = '';
	for await (const line of linesOf(db, set)) {
		piece += `${line}\n`;
		if (piece.length < PIECE) continue;
		yield piece;
		piece = '';
	}
	yield piece;
}

/** A set holds sweeps or readings. */
async function* linesOf(db: Database, set: number): AsyncGenerator<string> {
	const [reading] = await db
		.select({ chunk: readingBlock.chunk })
		.from(readingBlock)
		.where(eq(readingBlock.set, set))
		.limit(1);
	yield* reading === undefined ? sweepLines(db, set) : readingLines(db, set);
}

async function* sweepLines(db: Database, set: number): AsyncGenerator<string> {
	const keys = await db
		.select({
			quantity: sweepBlock.quantity,
			conditionKey: sweepBlock.conditionKey,
			chunk: sweepBlock.chunk,
			gridHash: sweepBlock.gridHash,
			unitScale: sweepBlock.unitScale
		})
		.from(sweepBlock)
		.where(eq(sweepBlock.set, set))
		.orderBy(asc(sweepBlock.chunk), asc(sweepBlock.conditionKey));
	const [first] = keys;
	yield exportHeader(first?.unitScale ?? 1, first?.quantity);
	for (const { quantity, conditionKey, chunk, gridHash } of keys) {
		yield* exportLines(await readBlock(db, { set, quantity, conditionKey, chunk, gridHash }));
	}
}

async function* readingLines(db: Database, set: number): AsyncGenerator<string> {
	const keys = await db
		.select({
			characteristic: readingBlock.characteristic,
			conditionKey: readingBlock.conditionKey,
			repeat: readingBlock.repeat,
			chunk: readingBlock.chunk
		})
		.from(readingBlock)
		.where(eq(readingBlock.set, set))
		.orderBy(
			asc(readingBlock.chunk),
			asc(readingBlock.characteristic),
			asc(readingBlock.conditionKey),
			asc(readingBlock.repeat)
		);
	yield READINGS_HEADER;
	for (const key of keys) yield* exportReadings(await readReadingBlock(db, { set, ...key }));
}

async function readReadingBlock(
	db: Database,
	key: {
		readonly set: number;
		readonly characteristic: string;
		readonly conditionKey: string;
		readonly repeat: number;
		readonly chunk: number;
	}
) {
	const [found] = await db
		.select({ readings: readingBlock, devices: deviceBlock.devices })
		.from(readingBlock)
		.innerJoin(
			deviceBlock,
			and(eq(deviceBlock.set, readingBlock.set), eq(deviceBlock.chunk, readingBlock.chunk))
		)
		.where(
			and(
				eq(readingBlock.set, key.set),
				eq(readingBlock.characteristic, key.characteristic),
				eq(readingBlock.conditionKey, key.conditionKey),
				eq(readingBlock.repeat, key.repeat),
				eq(readingBlock.chunk, key.chunk)
			)
		)
		.limit(1);
	if (found === undefined) throw new Error(`set ${key.set} has no block ${key.conditionKey}`);
	const { readings } = found;
	return {
		characteristic: readings.characteristic,
		condition: readConditionKey(readings.conditionKey),
		unit: unitSymbol(readings.characteristic, readings.unitScale),
		devices: deviceColumns.parse(found.devices),
		values: unpackMatrix(readings.values),
		censored: unpackFlags(readings.censored)
	};
}

function unitSymbol(characteristic: string, unitScale: number): string {
	const kind = readingKind(findCharacteristic(characteristic)?.unit ?? '');
	const unit = kind && findUnitOfSize(kind, unitScale);
	if (unit === undefined) throw new Error(`${characteristic} has no unit of ${unitScale}`);
	return unit.symbol;
}

async function readBlock(
	db: Database,
	key: {
		readonly set: number;
		readonly quantity: SweptQuantity;
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
				eq(sweepBlock.quantity, key.quantity),
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
		frequency,
		devices: deviceColumns.parse(found.devices),
		biases: found.sweeps.grid,
		values: unpackMatrix(found.sweeps.values)
	};
}
