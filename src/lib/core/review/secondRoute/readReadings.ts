import type { DeviceValue, PackedBlock } from './readColumn';

/** A block of single readings as it lies in the table. */
export interface ReadingBlock extends Omit<PackedBlock, 'grid'> {
	/** One signed byte a device: at most (−1), exactly (0), at least (1). */
	readonly flags: Uint8Array;
}

export interface Readings {
	readonly devices: readonly DeviceValue[];
	/** How many of them only say "at most" or "at least". */
	readonly censored: number;
}

/** Eight bytes a number, little endian. */
const BYTES = 8;

/**
 * Single readings straight from the bytes of their blocks: a reader of its own, as `readColumn` is
 * for sweeps. A device that was read several times counts once, with the mean of its values; it is
 * censored when one of them is.
 *
 * @param isLeftOut whether a row of a set is excluded or waits in quarantine
 * @param waferLots the independent lot of a lot, where it is another
 */
export function readReadings(
	blocks: readonly ReadingBlock[],
	isLeftOut: (set: number, row: number) => boolean,
	waferLots: ReadonlyMap<string, string>
): Readings {
	const found = new Map<string, { of: Omit<DeviceValue, 'value'>; sum: number; times: number }>();
	const bounds = new Set<string>();
	for (const block of blocks) {
		const view = new DataView(block.bytes.buffer, block.bytes.byteOffset, block.bytes.byteLength);
		const { lot, wafer, site, element, name } = block.devices;
		for (let row = 0; row < name.length; row++) {
			if (isLeftOut(block.set, block.firstRow + row)) continue;
			const value = view.getFloat64(row * BYTES, true);
			if (Number.isNaN(value)) continue;
			const key = JSON.stringify([lot[row], wafer[row], site[row], element[row], name[row]]);
			const lotName = lot[row] ?? '';
			const entry = found.get(key) ?? {
				of: {
					lot: lotName,
					waferLot: waferLots.get(lotName) ?? lotName,
					wafer: wafer[row] ?? '',
					device: name[row] ?? ''
				},
				sum: 0,
				times: 0
			};
			entry.sum += value * block.unitScale;
			entry.times += 1;
			found.set(key, entry);
			if (block.flags[row] !== 0) bounds.add(key);
		}
	}
	return {
		devices: [...found.values()].map(({ of, sum, times }) => ({ ...of, value: sum / times })),
		censored: bounds.size
	};
}
