import { conditionKey } from '../characteristics/condition';
import { CHUNK } from './blocks';
import type { DeviceColumns } from './blocks';
import { DeviceList, type DeviceName } from './deviceList';

/** What is swept along the bias. */
export type SweptQuantity = 'capacitance' | 'current';

/** Beyond these a file is refused: matrices of devices × biases would be mostly empty. */
export const MOST_BIASES = 1024;
export const MOST_CONDITIONS = 64;

/** Sweeps as they are read: devices, and one matrix a temperature and frequency. */
export class SweepTable {
	readonly #devices = new DeviceList();
	readonly #conditions = new Map<string, ConditionSweeps>();
	#last: ConditionSweeps | undefined;

	constructor(readonly quantity: SweptQuantity = 'capacitance') {}

	get devices(): DeviceColumns {
		return this.#devices.columns;
	}

	/** The index of a device; a new one gets the next. */
	deviceIndex(name: DeviceName): number {
		return this.#devices.indexOf(name);
	}

	/**
	 * The sweeps of a temperature and frequency (a current has none); `undefined` when there are too
	 * many already.
	 */
	condition(temperatureCelsius: number, frequency?: number): ConditionSweeps | undefined {
		const last = this.#last;
		if (last?.temperatureCelsius === temperatureCelsius && last.frequency === frequency) {
			return last;
		}
		const key = conditionKey({
			temperatureCelsius,
			...(frequency === undefined ? {} : { frequency })
		});
		let found = this.#conditions.get(key);
		if (found === undefined) {
			if (this.#conditions.size >= MOST_CONDITIONS) return undefined;
			found = new ConditionSweeps(key, temperatureCelsius, frequency, this.quantity);
			this.#conditions.set(key, found);
		}
		this.#last = found;
		return found;
	}

	get deviceCount(): number {
		return this.#devices.count;
	}

	/** From the coldest to the hottest, then by frequency. */
	conditions(): ConditionSweeps[] {
		return [...this.#conditions.values()].sort(
			(a, b) =>
				a.temperatureCelsius - b.temperatureCelsius || (a.frequency ?? 0) - (b.frequency ?? 0)
		);
	}
}

/**
 * Sweeps at one temperature and frequency: devices × biases, in chunks. A bias that a device has
 * twice gets a column of its own for the second reading, so nothing is lost and a sweep up and
 * down keeps its order.
 */
export class ConditionSweeps {
	/** The bias of each column in V, reverse positive. */
	readonly biases: number[] = [];
	/** The most decimals seen in each column: its resolution. */
	readonly decimals: number[] = [];
	#points = 0;
	#capacity = 48;
	readonly #chunks: Float64Array[] = [];
	readonly #columnsOf = new Map<number, number[]>();

	constructor(
		readonly key: string,
		readonly temperatureCelsius: number,
		readonly frequency: number | undefined,
		readonly quantity: SweptQuantity = 'capacitance'
	) {}

	/** Takes a reading; `false` when there are too many biases already. */
	add(device: number, bias: number, value: number, decimals: number): boolean {
		const chunk = this.#chunkOf(device);
		const row = device % CHUNK;
		let columns = this.#columnsOf.get(bias);
		if (columns === undefined) {
			columns = [];
			this.#columnsOf.set(bias, columns);
		}
		for (const column of columns) {
			const at = row * this.#capacity + column;
			if (Number.isNaN(chunk[at])) {
				chunk[at] = value;
				this.#count(column, decimals);
				return true;
			}
		}

		const column = this.biases.length;
		if (column >= MOST_BIASES) return false;
		if (column >= this.#capacity) this.#grow();
		this.biases.push(bias);
		this.decimals.push(decimals);
		columns.push(column);
		this.#chunkOf(device)[row * this.#capacity + column] = value;
		this.#count(column, decimals);
		return true;
	}

	get points(): number {
		return this.#points;
	}

	/** The columns of each bias, in the order of the biases' values. */
	columnsByBias(): { readonly bias: number; readonly columns: readonly number[] }[] {
		return [...this.#columnsOf]
			.map(([bias, columns]) => ({ bias, columns }))
			.sort((a, b) => a.bias - b.bias);
	}

	/** A reading, NaN where there is none. */
	value(device: number, column: number): number {
		const chunk = this.#chunks[Math.floor(device / CHUNK)];
		return chunk?.[(device % CHUNK) * this.#capacity + column] ?? Number.NaN;
	}

	/** One chunk as it is stored, rows × biases; `undefined` when none of its devices was swept. */
	matrix(chunk: number, rows: number): Float64Array | undefined {
		const source = this.#chunks[chunk];
		if (source === undefined) return undefined;
		const width = this.biases.length;
		const values = new Float64Array(rows * width);
		for (let row = 0; row < rows; row++) {
			const from = row * this.#capacity;
			values.set(source.subarray(from, from + width), row * width);
		}
		return values;
	}

	#count(column: number, decimals: number): void {
		this.#points += 1;
		if (decimals > (this.decimals[column] ?? 0)) this.decimals[column] = decimals;
	}

	#chunkOf(device: number): Float64Array {
		const index = Math.floor(device / CHUNK);
		let chunk = this.#chunks[index];
		if (chunk === undefined) {
			chunk = new Float64Array(CHUNK * this.#capacity).fill(Number.NaN);
			this.#chunks[index] = chunk;
		}
		return chunk;
	}

	#grow(): void {
		const before = this.#capacity;
		this.#capacity = before * 2;
		for (const [index, chunk] of this.#chunks.entries()) {
			if (chunk === undefined) continue;
			const wider = new Float64Array(CHUNK * this.#capacity).fill(Number.NaN);
			for (let row = 0; row < CHUNK; row++) {
				wider.set(chunk.subarray(row * before, (row + 1) * before), row * this.#capacity);
			}
			this.#chunks[index] = wider;
		}
	}
}
