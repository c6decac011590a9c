import { and, asc, eq, inArray } from 'drizzle-orm';
import type { DeviceIndex } from '$lib/core/distributions/indexDevices';
import { CHUNK, unpackFlags, unpackMatrix } from '$lib/core/measurements/blocks';
import { inSi } from '$lib/core/units/unit';
import type { Database } from '../db/database';
import { readingBlock } from '../db/schema';

/** What was read single, of which there may be several conditions. */
export interface ReadingSeriesKey {
	readonly characteristic: string;
	readonly conditionKey: string;
}

/** The characteristics and conditions of which these sets hold readings. */
export async function readingSeries(
	db: Database,
	sets: readonly number[]
): Promise<ReadingSeriesKey[]> {
	if (sets.length === 0) return [];
	return db
		.selectDistinct({
			characteristic: readingBlock.characteristic,
			conditionKey: readingBlock.conditionKey
		})
		.from(readingBlock)
		.where(inArray(readingBlock.set, [...sets]))
		.orderBy(asc(readingBlock.characteristic), asc(readingBlock.conditionKey));
}

/** One value a device in SI units, NaN without one, and what it says. */
export interface DeviceReadings {
	readonly values: Float64Array;
	/** At most (−1), exactly (0), at least (1). */
	readonly censored: Int8Array;
	/** The sets that gave a value. */
	readonly sets: readonly number[];
}

/**
 * The readings of a characteristic at one condition, one a device in the order of `devices`. What a
 * device has several times is averaged; a mean with a bound among its values is a bound itself. A
 * device that two sets bound from both sides keeps the newer set's word.
 *
 * @param isLeftOut whether this row of the set is excluded or quarantined
 */
export async function readingsOf(
	db: Database,
	sets: readonly number[],
	of: ReadingSeriesKey & {
		readonly devices: Pick<DeviceIndex, 'deviceCount' | 'devicesOf'>;
		readonly isLeftOut?: (set: number, row: number) => boolean;
	}
): Promise<DeviceReadings> {
	const { devices, isLeftOut = () => false } = of;
	const sums = new Float64Array(devices.deviceCount);
	const counts = new Uint32Array(devices.deviceCount);
	const censored = new Int8Array(devices.deviceCount);
	const contributing = new Set<number>();
	for (const set of sets) {
		const blocks = await db
			.select()
			.from(readingBlock)
			.where(
				and(
					eq(readingBlock.set, set),
					eq(readingBlock.characteristic, of.characteristic),
					eq(readingBlock.conditionKey, of.conditionKey)
				)
			)
			.orderBy(asc(readingBlock.chunk), asc(readingBlock.repeat));
		for (const { chunk, unitScale, values, censored: flags } of blocks) {
			const read = unpackMatrix(values);
			const bounds = unpackFlags(flags);
			for (const [row, value] of read.entries()) {
				const device = devices.devicesOf.get(set)?.[chunk * CHUNK + row] ?? -1;
				if (Number.isNaN(value) || device < 0 || isLeftOut(set, chunk * CHUNK + row)) continue;
				sums[device] = (sums[device] ?? 0) + inSi(value, { symbol: '', scale: unitScale });
				counts[device] = (counts[device] ?? 0) + 1;
				const bound = bounds[row] ?? 0;
				if (bound !== 0) censored[device] = bound;
				contributing.add(set);
			}
		}
	}
	return {
		values: sums.map((sum, device) => {
			const count = counts[device] ?? 0;
			return count === 1 ? sum : sum / count;
		}),
		censored,
		sets: [...contributing]
	};
}
