import type { Characteristic } from '../characteristics/catalogue';
import { conditionKey } from '../characteristics/condition';
import type { Condition } from '../characteristics/condition';
import type { Unit } from '../units/unit';
import { CHUNK } from './blocks';
import type { CensorFlag } from './censorMark';
import { DeviceList } from './deviceList';

/** Beyond these a file is refused: blocks would be mostly empty. */
export const MOST_SERIES = 256;
export const MOST_REPEATS = 64;

/** Single readings as they are read: devices, and one series a characteristic and condition. */
export class ReadingTable {
	readonly devices = new DeviceList();
	readonly #series = new Map<string, ReadingSeries>();

	/** The readings at a condition; `undefined` when there are too many series already. */
	seriesOf(
		characteristic: Characteristic,
		condition: Condition,
		unit: Unit
	): ReadingSeries | undefined {
		const key = `${characteristic.key} ${conditionKey(condition)}`;
		const known = this.#series.get(key);
		if (known !== undefined) return known;
		if (this.#series.size >= MOST_SERIES) return undefined;
		const made = new ReadingSeries(characteristic, condition, unit);
		this.#series.set(key, made);
		return made;
	}

	/** By characteristic, then from the coldest to the hottest, then by the other conditions. */
	series(): ReadingSeries[] {
		const rank = ({ characteristic, condition }: ReadingSeries) =>
			[
				condition.temperatureCelsius,
				...characteristic.axes.map((axis) => condition[axis] ?? -Infinity)
			] as const;
		return [...this.#series.values()].sort((a, b) => {
			if (a.characteristic.key !== b.characteristic.key) {
				return a.characteristic.key < b.characteristic.key ? -1 : 1;
			}
			const [first, second] = [rank(a), rank(b)];
			const at = first.findIndex((value, index) => value !== second[index]);
			return at < 0 ? 0 : (first[at] ?? 0) - (second[at] ?? 0);
		});
	}
}

interface Block {
	readonly values: Float64Array;
	readonly censored: Int8Array;
}

/** What a device has at a condition when its repeats are averaged. */
export interface DeviceReading {
	/** NaN where there is none. */
	readonly value: number;
	readonly censored: CensorFlag;
}

/** The readings of one characteristic at one condition, in the file's unit, repeats kept. */
export class ReadingSeries {
	readonly key: string;
	/** The most decimals seen: the resolution. */
	decimals = -Infinity;
	readings = 0;
	censoredReadings = 0;
	/** By repeat, then chunk. */
	readonly #blocks: (Block | undefined)[][] = [];

	constructor(
		readonly characteristic: Characteristic,
		readonly condition: Condition,
		readonly unit: Unit
	) {
		this.key = conditionKey(condition);
	}

	get repeats(): number {
		return this.#blocks.length;
	}

	/** Takes a reading; says when the device has too many already, or they contradict it. */
	add(
		device: number,
		value: number,
		censored: CensorFlag,
		decimals: number
	): 'taken' | 'tooMany' | 'contradiction' {
		let repeat = 0;
		for (; repeat < this.#blocks.length; repeat++) {
			const before = this.at(device, repeat);
			if (Number.isNaN(before.value)) break;
			if (before.censored * censored === -1) return 'contradiction';
		}
		if (repeat >= MOST_REPEATS) return 'tooMany';
		const { values, censored: flags } = this.#blockOf(repeat, Math.floor(device / CHUNK));
		values[device % CHUNK] = value;
		flags[device % CHUNK] = censored;
		this.readings += 1;
		if (censored !== 0) this.censoredReadings += 1;
		if (decimals > this.decimals) this.decimals = decimals;
		return 'taken';
	}

	/** One reading of a device. */
	at(device: number, repeat: number): DeviceReading {
		const block = this.#blocks[repeat]?.[Math.floor(device / CHUNK)];
		return {
			value: block?.values[device % CHUNK] ?? Number.NaN,
			censored: asFlag(block?.censored[device % CHUNK])
		};
	}

	/**
	 * A device's readings as one. A mean with a bound among its values is a bound itself: what is at
	 * most 0.1 and what is 0.3 are together at most 0.2.
	 */
	of(device: number): DeviceReading {
		let [sum, count] = [0, 0];
		let censored: CensorFlag = 0;
		for (let repeat = 0; repeat < this.repeats; repeat++) {
			const reading = this.at(device, repeat);
			if (Number.isNaN(reading.value)) break;
			sum += reading.value;
			count += 1;
			if (reading.censored !== 0) censored = reading.censored;
		}
		return { value: count === 1 ? sum : sum / count, censored };
	}

	/** One chunk as it is stored; `undefined` when none of its devices has such a reading. */
	block(repeat: number, chunk: number, rows: number): Block | undefined {
		const block = this.#blocks[repeat]?.[chunk];
		return (
			block && {
				values: block.values.slice(0, rows),
				censored: block.censored.slice(0, rows)
			}
		);
	}

	#blockOf(repeat: number, chunk: number): Block {
		const chunks = (this.#blocks[repeat] ??= []);
		return (chunks[chunk] ??= {
			values: new Float64Array(CHUNK).fill(Number.NaN),
			censored: new Int8Array(CHUNK)
		});
	}
}

function asFlag(stored: number | undefined): CensorFlag {
	return stored === -1 || stored === 1 ? stored : 0;
}
