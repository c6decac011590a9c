import type { DeviceValue } from './readColumn';

/** One level of the spread: squares about the means, their degrees, the share a device has of it. */
export interface Level {
	readonly squares: number;
	readonly degrees: number;
	readonly share: number;
}

/** Lots as random: mean of lot means, and the levels from lots down to devices. */
export interface LotSpread {
	readonly mean: number;
	readonly lots: number;
	readonly levels: readonly [Level, ...Level[]];
}

type LoggedDevice = Pick<DeviceValue, 'waferLot' | 'wafer'> & { readonly y: number };

const meanOf = (numbers: readonly number[]) =>
	numbers.reduce((sum, number) => sum + number, 0) / numbers.length;
const squaresOf = (numbers: readonly number[]) => {
	const centre = meanOf(numbers);
	return numbers.reduce((sum, number) => sum + (number - centre) ** 2, 0);
};

/**
 * Unweighted means from the devices themselves, level by level, each lot counting once. With one
 * wafer a lot (or one device a wafer) there are lots and devices only.
 *
 * @returns `undefined` for fewer than two lots, or lots of one device
 */
export function lotSpread(devices: readonly LoggedDevice[]): LotSpread | undefined {
	const lots = splitBy(devices, ({ waferLot }) => waferLot).map((lot) =>
		splitBy(lot, ({ wafer }) => wafer).map((wafer) => wafer.map(({ y }) => y))
	);
	const wafers = lots.flat();
	if (lots.length < 2 || devices.length <= lots.length) return undefined;
	return wafers.length > lots.length && devices.length > wafers.length
		? ofLevels(lots)
		: ofLevels(lots.map((lot) => [lot.flat()]));
}

function ofLevels(lots: readonly (readonly (readonly number[])[])[]): LotSpread {
	const wafers = lots.flat();
	const lotMeans = lots.map((lot) => meanOf(lot.map(meanOf)));
	const waferDegrees = wafers.length - lots.length;
	const deviceDegrees = wafers.reduce((sum, { length }) => sum + length - 1, 0);
	const inverseDevices = lots.map((lot) => meanOf(lot.map(({ length }) => 1 / length)));

	/** What a lot mean keeps of the wafers' and of the devices' variance. */
	const wafersInLot = meanOf(lots.map(({ length }) => 1 / length));
	const devicesInLot = meanOf(lots.map(({ length }, at) => (inverseDevices[at] ?? NaN) / length));
	const lot = { squares: squaresOf(lotMeans), degrees: lots.length - 1, share: 1 };
	const inside = sum(wafers.map(squaresOf));
	if (waferDegrees === 0) {
		const device = { squares: inside, degrees: deviceDegrees, share: 1 - devicesInLot };
		return { mean: meanOf(lotMeans), lots: lots.length, levels: [lot, device] };
	}
	const devicesInWafer =
		sum(lots.map(({ length }, at) => (length - 1) * (inverseDevices[at] ?? NaN))) / waferDegrees;
	const waferShare = 1 - wafersInLot;
	return {
		mean: meanOf(lotMeans),
		lots: lots.length,
		levels: [
			lot,
			{
				squares: sum(lots.map((of) => squaresOf(of.map(meanOf)))),
				degrees: waferDegrees,
				share: waferShare
			},
			{
				squares: inside,
				degrees: deviceDegrees,
				share: 1 - devicesInLot - devicesInWafer * waferShare
			}
		]
	};
}

const sum = (numbers: readonly number[]) => numbers.reduce((total, number) => total + number, 0);

function splitBy<Item>(items: readonly Item[], keyOf: (item: Item) => string): Item[][] {
	const keys = [...new Set(items.map(keyOf))];
	return keys.map((key) => items.filter((item) => keyOf(item) === key));
}
