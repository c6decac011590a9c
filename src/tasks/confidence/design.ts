import type { GroupSums } from '$lib/core/stats/varianceComponents';
import type { Draws } from './draws';

/** Devices of each wafer of each lot; a lot of one wafer is a plain lot. */
export interface Design {
	readonly shape: string;
	readonly lots: readonly (readonly number[])[];
}

/** Variances of a population whose total is 1 and whose mean is 0. */
export interface Population {
	readonly lot: number;
	readonly wafer: number;
	readonly device: number;
}

/** How much of the variance lies between lots. */
export const LOT_SHARES = [0, 0.3, 0.6, 0.9] as const;

export const LOT_COUNTS = [3, 5, 8, 12] as const;

/** Devices of each lot. */
export const lotSizes = ({ lots }: Design): number[] =>
	lots.map((wafers) => wafers.reduce((sum, size) => sum + size, 0));

const cycle = <Item>(items: readonly Item[], count: number): Item[] =>
	Array.from({ length: count }, (_, i) => items[i % items.length]!);

const plain = (sizes: readonly number[]) => sizes.map((size) => [size]);

/** Lots and devices, for each number of lots: alike, unequal, and unequal beyond reason. */
export const ONE_WAY: readonly Design[] = LOT_COUNTS.flatMap((count) => [
	{ shape: 'lots of 25', lots: plain(cycle([25], count)) },
	{ shape: 'lots of 50, 20, 5 …', lots: plain(cycle([50, 20, 5], count)) },
	{ shape: 'lots of 150, 5, 2 …', lots: plain(cycle([150, 5, 2], count)) }
]);

/** Lots, wafers and devices. */
export const NESTED: readonly Design[] = [3, 5, 12].flatMap((count) => [
	{ shape: 'lots of 3 wafers of 8', lots: cycle([[8, 8, 8]], count) },
	{ shape: 'lots of 1 to 4 wafers of 2 to 15', lots: cycle([[15, 12, 4, 2], [10, 3], [6]], count) }
]);

export const oneWayPopulation = (lot: number): Population => ({ lot, wafer: 0, device: 1 - lot });

/** Wafers carry half of what lots leave. */
export const nestedPopulation = (lot: number): Population => ({
	lot,
	wafer: (1 - lot) / 2,
	device: (1 - lot) / 2
});

/** The sums that one sample of a design shows: exact draws of means and squares, no devices. */
export function drawSums(design: Design, population: Population, draws: Draws): GroupSums[][] {
	const { normal, chiSquare } = draws;
	const [lot, wafer, device] = [population.lot, population.wafer, population.device].map(
		Math.sqrt
	) as [number, number, number];
	return design.lots.map((wafers) => {
		const ofLot = lot * normal();
		return wafers.map((sampleSize) => ({
			sampleSize,
			mean: ofLot + wafer * normal() + (device / Math.sqrt(sampleSize)) * normal(),
			sumOfSquares: population.device * chiSquare(sampleSize - 1)
		}));
	});
}
