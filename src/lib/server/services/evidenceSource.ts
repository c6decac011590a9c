import { and, eq, sql } from 'drizzle-orm';
import { z } from 'zod';
import { conditionKey } from '$lib/core/characteristics/condition';
import { limitRow, type LimitRow } from '$lib/core/limits/limit';
import { limitPolicy, type LimitPolicy } from '$lib/core/limits/policy';
import {
	readColumn,
	type DeviceValue,
	type PackedBlock
} from '$lib/core/review/secondRoute/readColumn';
import { readRatio } from '$lib/core/review/secondRoute/readRatio';
import { readReadings } from '$lib/core/review/secondRoute/readReadings';
import type { Database } from '../db/database';
import {
	deviceBlock,
	limitMemo,
	lot,
	measurementSet,
	policyVersion,
	readingBlock,
	suspect,
	sweepBlock,
	verdict
} from '../db/schema';

/** Rows of a full block, by which a device is numbered over its set. */
const ROWS_PER_BLOCK = 2048;

const names = z.array(z.string());
const deviceNames = z.object({
	lot: names,
	wafer: names,
	site: names,
	element: names,
	name: names
});

/** A temperature and frequency. */
export interface SweepCondition {
	readonly temperatureCelsius: number;
	readonly frequency: number | undefined;
}

export interface MeasuredDevices {
	readonly devices: readonly DeviceValue[];
	readonly independentLots: number;
	/** Largest stated uncertainty of the sets behind the values, relative. */
	readonly uncertainty: number;
	/** Devices of which the reading is only a bound. */
	readonly censored: number;
}

export interface StoredLimit {
	readonly row: LimitRow;
	readonly rules: LimitPolicy;
}

/**
 * Reads what the second route needs, apart from the reader behind the distributions: packed blocks,
 * verdicts and stored limits as they lie in the tables. Keeps the blocks of one condition at a time.
 */
export class EvidenceSource {
	readonly #db: Database;
	readonly #product: number;
	#blocks: { readonly key: string; readonly blocks: PackedBlock[] } | undefined;
	#leftOut: ReadonlySet<string> | undefined;

	constructor(db: Database, product: number) {
		this.#db = db;
		this.#product = product;
	}

	/** How many bytes of packed values lie at these conditions. */
	async byteSize(): Promise<number> {
		const [sum] = await this.#db
			.select({ bytes: sql<number>`coalesce(sum(length(${sweepBlock.values})), 0)` })
			.from(sweepBlock)
			.innerJoin(measurementSet, eq(sweepBlock.set, measurementSet.id))
			.where(this.#accepted());
		return sum?.bytes ?? 0;
	}

	/** The stored limit a printed row names as its source. */
	async storedLimit(trace: string): Promise<StoredLimit | 'missing' | 'unreadable'> {
		const [memo] = await this.#db
			.select({ result: limitMemo.result, rules: policyVersion.json })
			.from(limitMemo)
			.innerJoin(policyVersion, eq(limitMemo.policyVersion, policyVersion.id))
			.where(eq(limitMemo.inputHash, trace))
			.orderBy(limitMemo.id)
			.limit(1);
		if (memo === undefined) return 'missing';
		const row = limitRow.safeParse(memo.result);
		const rules = limitPolicy.safeParse(memo.rules);
		return row.success && rules.success ? { row: row.data, rules: rules.data } : 'unreadable';
	}

	/** The devices measured at a bias, without those that verdicts or quarantine leave out. */
	async devicesAt(at: SweepCondition, bias: number): Promise<MeasuredDevices> {
		const key = sweepKey(at);
		const blocks = (await this.#blocksAt(key)).filter(({ grid }) => grid.includes(bias));
		const devices = readColumn(blocks, bias, await this.#isLeftOut(key), await this.#waferLots());
		return this.#measured(devices, blocks);
	}

	/**
	 * The ratio of each device's capacitances at two biases, left out as above. Its uncertainty is
	 * that of both together.
	 */
	async ratiosAt(
		at: SweepCondition,
		biases: readonly [low: number, high: number]
	): Promise<MeasuredDevices> {
		const key = sweepKey(at);
		const blocks = (await this.#blocksAt(key)).filter(({ grid }) =>
			biases.some((bias) => grid.includes(bias))
		);
		const devices = readRatio(blocks, biases, await this.#isLeftOut(key), await this.#waferLots());
		const measured = await this.#measured(devices, blocks);
		return { ...measured, uncertainty: 2 * measured.uncertainty };
	}

	/** The single readings of a characteristic at a condition, left out as above. */
	async readingsOf(characteristic: string, conditionKeyText: string): Promise<MeasuredDevices> {
		const rows = await this.#db
			.select({
				set: readingBlock.set,
				chunk: readingBlock.chunk,
				unitScale: readingBlock.unitScale,
				bytes: readingBlock.values,
				flags: readingBlock.censored,
				devices: deviceBlock.devices
			})
			.from(readingBlock)
			.innerJoin(measurementSet, eq(readingBlock.set, measurementSet.id))
			.innerJoin(
				deviceBlock,
				and(eq(deviceBlock.set, readingBlock.set), eq(deviceBlock.chunk, readingBlock.chunk))
			)
			.where(
				and(
					this.#accepted(),
					eq(readingBlock.characteristic, characteristic),
					eq(readingBlock.conditionKey, conditionKeyText)
				)
			);
		const blocks = rows.map(placed);
		const { devices, censored } = readReadings(
			blocks,
			await this.#isLeftOut(`${characteristic} ${conditionKeyText}`),
			await this.#waferLots()
		);
		return this.#measured(devices, blocks, censored);
	}

	async #measured(
		devices: readonly DeviceValue[],
		blocks: readonly { readonly set: number }[],
		censored = 0
	): Promise<MeasuredDevices> {
		return {
			devices,
			independentLots: new Set(devices.map(({ waferLot }) => waferLot)).size,
			uncertainty: await this.#uncertainty(new Set(blocks.map(({ set }) => set))),
			censored
		};
	}

	async #isLeftOut(key: string): Promise<(set: number, row: number) => boolean> {
		this.#leftOut ??= await this.#readLeftOut();
		const leftOut = this.#leftOut;
		return (set, row) => leftOut.has(`${set}/${row}/${key}`);
	}

	#accepted() {
		return and(eq(measurementSet.product, this.#product), eq(measurementSet.state, 'accepted'));
	}

	async #blocksAt(key: string): Promise<PackedBlock[]> {
		if (this.#blocks?.key === key) return this.#blocks.blocks;
		const rows = await this.#db
			.select({
				set: sweepBlock.set,
				chunk: sweepBlock.chunk,
				grid: sweepBlock.grid,
				unitScale: sweepBlock.unitScale,
				bytes: sweepBlock.values,
				devices: deviceBlock.devices
			})
			.from(sweepBlock)
			.innerJoin(measurementSet, eq(sweepBlock.set, measurementSet.id))
			.innerJoin(
				deviceBlock,
				and(eq(deviceBlock.set, sweepBlock.set), eq(deviceBlock.chunk, sweepBlock.chunk))
			)
			.where(
				and(
					this.#accepted(),
					eq(sweepBlock.quantity, 'capacitance'),
					eq(sweepBlock.conditionKey, key)
				)
			);
		const blocks = rows.map(placed);
		this.#blocks = { key, blocks };
		return blocks;
	}

	/** `set/device/condition` of what the newest verdict excludes, and of suspects without one. */
	async #readLeftOut(): Promise<ReadonlySet<string>> {
		const suspects = await this.#db
			.select({ set: suspect.set, device: suspect.device, key: suspect.conditionKey })
			.from(suspect)
			.innerJoin(measurementSet, eq(suspect.set, measurementSet.id))
			.where(this.#accepted());
		const verdicts = await this.#db
			.select({
				set: verdict.set,
				device: verdict.device,
				key: verdict.conditionKey,
				decision: verdict.decision
			})
			.from(verdict)
			.innerJoin(measurementSet, eq(verdict.set, measurementSet.id))
			.where(this.#accepted())
			.orderBy(verdict.id);
		const leftOut = new Set(suspects.map(({ set, device, key }) => `${set}/${device}/${key}`));
		for (const { set, device, key, decision } of verdicts) {
			const at = `${set}/${device}/${key}`;
			if (decision === 'exclude') leftOut.add(at);
			else leftOut.delete(at);
		}
		return leftOut;
	}

	async #waferLots(): Promise<ReadonlyMap<string, string>> {
		const lots = await this.#db.select().from(lot).where(eq(lot.product, this.#product));
		return new Map(lots.map(({ name, waferLot }) => [name, waferLot]));
	}

	async #uncertainty(sets: ReadonlySet<number>): Promise<number> {
		const stated = await this.#db
			.select({ id: measurementSet.id, uncertainty: measurementSet.uncertainty })
			.from(measurementSet)
			.where(this.#accepted());
		return Math.max(
			0,
			...stated.filter(({ id }) => sets.has(id)).map(({ uncertainty }) => uncertainty ?? 0)
		);
	}
}

/** A row of a table as a block, its devices named and numbered over their set. */
function placed<Row extends { readonly chunk: number; readonly devices: unknown }>({
	chunk,
	devices,
	...rest
}: Row) {
	return { ...rest, firstRow: chunk * ROWS_PER_BLOCK, devices: deviceNames.parse(devices) };
}

function sweepKey({ temperatureCelsius, frequency }: SweepCondition): string {
	return conditionKey({
		temperatureCelsius,
		...(frequency === undefined ? {} : { frequency })
	});
}
