import { readColumn, type DeviceValue, type PackedBlock } from './readColumn';

/**
 * C(V_1)/C(V_2) of each device with both, straight from the bytes of the blocks. Each device is
 * read by itself, so that two of one name on different sites don't meet.
 *
 * @param isLeftOut whether a row of a set is excluded or waits in quarantine
 */
export function readRatio(
	blocks: readonly PackedBlock[],
	[low, high]: readonly [low: number, high: number],
	isLeftOut: (set: number, row: number) => boolean,
	waferLots: ReadonlyMap<string, string> = new Map()
): DeviceValue[] {
	const named = blocks.map((block) => ({ ...block, devices: wholeNames(block) }));
	const atHigh = new Map(
		readColumn(named, high, isLeftOut).map(({ device, value }) => [device, value])
	);
	return readColumn(named, low, isLeftOut, waferLots).flatMap((of) => {
		const divisor = atHigh.get(of.device);
		if (divisor === undefined) return [];
		const parts: unknown = JSON.parse(of.device);
		const device = Array.isArray(parts) ? String(parts.at(-1)) : of.device;
		return [{ ...of, device, value: of.value / divisor }];
	});
}

/** The devices of a block, each called by everything that tells it from another. */
function wholeNames({ devices }: PackedBlock): PackedBlock['devices'] {
	const { lot, wafer, site, element, name } = devices;
	return {
		...devices,
		name: name.map((of, row) => JSON.stringify([lot[row], wafer[row], site[row], element[row], of]))
	};
}
