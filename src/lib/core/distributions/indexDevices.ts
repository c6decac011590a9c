/** Who the devices of one block are: parallel arrays, one entry a row. */
export interface DeviceNames {
	readonly lot: readonly string[];
	readonly wafer: readonly string[];
	readonly site: readonly string[];
	readonly element: readonly string[];
	readonly name: readonly string[];
}

/** The devices of one accepted set, chunk by chunk. */
export interface SetDevices {
	readonly set: number;
	readonly chunks: readonly { readonly chunk: number; readonly devices: DeviceNames }[];
}

/** The lot and wafer some devices share. */
export interface GroupName {
	readonly lot: string;
	readonly waferLot: string;
	readonly wafer: string;
}

/** Every device of a product once, however many sets measured it. */
export interface DeviceIndex {
	readonly deviceCount: number;
	/** In the order of lot, then wafer. */
	readonly groups: readonly GroupName[];
	/** The group of each device. */
	readonly groupOf: Int32Array;
	/** Per set, the device behind each row; −1 where a chunk has no such row. */
	readonly devicesOf: ReadonlyMap<number, Int32Array>;
}

const SEPARATOR = '\u001f';

/**
 * Numbers the devices of several sets. A device measured in two sets is one device: counted twice
 * it would pretend to a sample that was never there.
 *
 * @param rowsPerChunk how many rows a full chunk has, by which rows are counted over a set
 * @param waferLotOf the wafer lot of each lot; a lot that isn't listed is its own
 */
export function indexDevices(
	sets: readonly SetDevices[],
	rowsPerChunk: number,
	waferLotOf: ReadonlyMap<string, string>
): DeviceIndex {
	const deviceOf = new Map<string, number>();
	const groupNames: string[] = [];
	const devicesOf = new Map<number, Int32Array>();

	for (const { set, chunks } of sets) {
		const rows = Math.max(
			0,
			...chunks.map(({ chunk, devices }) => chunk * rowsPerChunk + devices.name.length)
		);
		const devices = new Int32Array(rows).fill(-1);
		for (const { chunk, devices: names } of chunks) {
			for (let row = 0; row < names.name.length; row++) {
				const group = [names.lot[row], names.wafer[row]].join(SEPARATOR);
				const identity = [group, names.site[row], names.element[row], names.name[row]].join(
					SEPARATOR
				);
				let device = deviceOf.get(identity);
				if (device === undefined) {
					device = groupNames.length;
					deviceOf.set(identity, device);
					groupNames.push(group);
				}
				devices[chunk * rowsPerChunk + row] = device;
			}
		}
		devicesOf.set(set, devices);
	}

	// The order of the groups must not depend on the order of the sets.
	const ordered = [...new Set(groupNames)].sort((a, b) => (a < b ? -1 : 1));
	const numberOf = new Map(ordered.map((name, number) => [name, number]));
	return {
		deviceCount: groupNames.length,
		groups: ordered.map((name) => {
			const [lot = '', wafer = ''] = name.split(SEPARATOR);
			return { lot, wafer, waferLot: waferLotOf.get(lot) ?? lot };
		}),
		groupOf: Int32Array.from(groupNames, (name) => numberOf.get(name) ?? -1),
		devicesOf
	};
}
