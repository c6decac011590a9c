/** One packed block as it lies in the table, with the devices of its rows. */
export interface PackedBlock {
	readonly set: number;
	readonly firstRow: number;
	readonly grid: readonly number[];
	readonly unitScale: number;
	readonly bytes: Uint8Array;
	readonly devices: {
		readonly lot: readonly string[];
		readonly wafer: readonly string[];
		readonly site: readonly string[];
		readonly element: readonly string[];
		readonly name: readonly string[];
	};
}

/** A device's value at one bias, in SI. */
export interface DeviceValue {
	readonly lot: string;
	/** The independent lot it belongs to. */
	readonly waferLot: string;
	readonly wafer: string;
	readonly device: string;
	readonly value: number;
}

/** Eight bytes a number, little endian. */
const BYTES = 8;

/**
 * The values at one bias, straight from the bytes of the blocks: a reader of its own, which shares
 * nothing with the one behind the distributions. A device that occurs several times counts once,
 * with the mean of its values.
 *
 * @param isLeftOut whether a row of a set is excluded or waits in quarantine
 * @param waferLots the independent lot of a lot, where it is another
 */
export function readColumn(
	blocks: readonly PackedBlock[],
	bias: number,
	isLeftOut: (set: number, row: number) => boolean,
	waferLots: ReadonlyMap<string, string> = new Map()
): DeviceValue[] {
	const found = new Map<string, { first: Omit<DeviceValue, 'value'>; values: number[] }>();
	for (const block of blocks) {
		const column = block.grid.indexOf(bias);
		if (column < 0) continue;
		const view = new DataView(block.bytes.buffer, block.bytes.byteOffset, block.bytes.byteLength);
		const { lot, wafer, site, element, name } = block.devices;
		for (let row = 0; row < name.length; row++) {
			if (isLeftOut(block.set, block.firstRow + row)) continue;
			const value = view.getFloat64((row * block.grid.length + column) * BYTES, true);
			if (Number.isNaN(value)) continue;
			const key = JSON.stringify([lot[row], wafer[row], site[row], element[row], name[row]]);
			const of = lot[row] ?? '';
			const entry = found.get(key) ?? {
				first: {
					lot: of,
					waferLot: waferLots.get(of) ?? of,
					wafer: wafer[row] ?? '',
					device: name[row] ?? ''
				},
				values: []
			};
			entry.values.push(value * block.unitScale);
			found.set(key, entry);
		}
	}
	return [...found.values()].map(({ first, values }) => ({
		...first,
		value: values.reduce((sum, value) => sum + value, 0) / values.length
	}));
}
