import {
	CONVERGED,
	FLAGS,
	IDENTIFIABLE,
	PARAMETERS,
	RESULT_WIDTH
} from '../junction/capacitanceFitResult';
import { fitSweeps } from '../junction/fitCapacitance';
import { quantile } from '../stats/quantile';
import type { BiasColumn } from './conditionColumns';
import type { DeviceIndex } from './indexDevices';
import {
	FITTED,
	type DistributionOfFits,
	type MedianSweep,
	type SweepFits,
	type WorstFit
} from './sweepFits';

/** Quantiles that are kept, and bars of a histogram. */
const PROBABILITIES = [0, 0.05, 0.25, 0.5, 0.75, 0.95, 1] as const;
const BARS = 24;
const MOST_WORST = 20;

/** A device of the condition: its row in the matrix of fits and whose it is. */
interface Fit {
	readonly device: number;
	/** Offset of its row in the results. */
	readonly at: number;
	readonly lot: string;
	readonly counts: boolean;
}

/**
 * Fits the law to every device of a condition and sums the fits up:
 *
 * columns → sweeps, device by device → fits → distributions of the parameters, worst residuals →
 * median sweeps
 *
 * A device whose readings don't tell the parameters apart has residuals that mean something, but no
 * parameters that do: it is counted, and in the distribution of residuals only.
 *
 * @param nameOf what a device is called within its wafer
 * @returns `undefined` for fewer biases than parameters, where there is nothing to fit
 */
export function summarizeFits(
	columns: readonly BiasColumn[],
	index: Pick<DeviceIndex, 'groups' | 'groupOf'>,
	nameOf: (device: number) => string
): SweepFits | undefined {
	const biases = columns.map(({ bias }) => bias);
	const deepest = Math.min(0, ...biases);
	if (biases.length < PARAMETERS.length || deepest < LOWEST_BIAS) return undefined;
	const present = devicesIn(columns, index.groupOf.length);
	if (present.length === 0) return undefined;

	const results = fitSweeps(biases, matrixOf(columns, present));
	const fits = present.map((device, row): Fit => {
		const at = row * RESULT_WIDTH;
		const flags = results[at + FLAGS]!;
		const counts = (flags & CONVERGED) !== 0 && (flags & IDENTIFIABLE) !== 0;
		return { device, at, lot: index.groups[index.groupOf[device]!]!.waferLot, counts };
	});
	const fitted = fits.filter(({ at }) => !Number.isNaN(results[at]!));
	const lots = [...new Set(fits.map(({ lot }) => lot))].sort((a, b) => (a < b ? -1 : 1));
	const lacks = (flag: number) =>
		fitted.filter(({ at }) => (results[at + FLAGS]! & flag) === 0).length;
	return {
		devices: present.length,
		tooFewReadings: present.length - fitted.length,
		notIdentifiable: lacks(IDENTIFIABLE),
		notConverged: lacks(CONVERGED),
		parameters: FITTED.map((_, column) => distributionOf(column, results, fitted, lots)),
		worst: worstOf(results, fitted, index, nameOf),
		biases,
		all: medianOf('', columns, present),
		lots: lots.map((lot) =>
			medianOf(
				lot,
				columns,
				fits.filter((of) => of.lot === lot).map(({ device }) => device)
			)
		)
	};
}

/** Forward of this no junction potential is large enough for the law. */
const LOWEST_BIAS = -19;

function devicesIn(columns: readonly BiasColumn[], count: number): number[] {
	return Array.from({ length: count }, (_, device) => device).filter((device) =>
		columns.some(({ values }) => !Number.isNaN(values[device]!))
	);
}

function matrixOf(columns: readonly BiasColumn[], devices: readonly number[]): Float64Array {
	const matrix = new Float64Array(devices.length * columns.length);
	for (const [row, device] of devices.entries())
		for (const [column, { values }] of columns.entries())
			matrix[row * columns.length + column] = values[device]!;
	return matrix;
}

function distributionOf(
	column: number,
	results: Float64Array,
	fitted: readonly Fit[],
	lots: readonly string[]
): DistributionOfFits {
	const isParameter = column < PARAMETERS.length;
	const counted = isParameter ? fitted.filter(({ counts }) => counts) : fitted;
	const sortedOf = (fits: readonly Fit[]) =>
		Float64Array.from(fits, ({ at }) => results[at + column]!).sort();
	const sorted = sortedOf(counted);
	return {
		name: FITTED[column]!,
		quantiles:
			sorted.length === 0
				? []
				: PROBABILITIES.map((probability) => ({
						probability,
						value: quantile(sorted, probability)
					})),
		bars: barsOf(sorted),
		lots: lots.map((name) => {
			const of = sortedOf(counted.filter(({ lot }) => lot === name));
			return { name, median: of.length === 0 ? null : quantile(of, 0.5) };
		}),
		atBound: isParameter
			? fitted.filter(({ at }) => (results[at + FLAGS]! & (1 << column)) !== 0).length
			: 0
	};
}

/** Bars of equal width from the smallest to the largest value; one of no width where all are alike. */
function barsOf(sorted: Float64Array): DistributionOfFits['bars'] {
	const [lowest, highest] = [sorted[0], sorted.at(-1)];
	if (lowest === undefined || highest === undefined) return [];
	if (lowest === highest) return [{ lower: lowest, upper: highest, count: sorted.length }];
	const width = (highest - lowest) / BARS;
	const counts = new Array<number>(BARS).fill(0);
	for (const value of sorted)
		counts[Math.min(BARS - 1, Math.floor((value - lowest) / width))]! += 1;
	return counts.map((count, bar) => ({
		lower: lowest + bar * width,
		upper: lowest + (bar + 1) * width,
		count
	}));
}

function worstOf(
	results: Float64Array,
	fitted: readonly Fit[],
	index: Pick<DeviceIndex, 'groups' | 'groupOf'>,
	nameOf: (device: number) => string
): WorstFit[] {
	const residual = ({ at }: Fit) => results[at + PARAMETERS.length]!;
	return fitted
		.toSorted((a, b) => residual(b) - residual(a) || a.device - b.device)
		.slice(0, MOST_WORST)
		.map((fit) => {
			const { lot, wafer } = index.groups[index.groupOf[fit.device]!]!;
			const flags = results[fit.at + FLAGS]!;
			return {
				...{ device: fit.device, lot, wafer, name: nameOf(fit.device) },
				residualRms: residual(fit),
				identifiable: (flags & IDENTIFIABLE) !== 0,
				boundsHit: PARAMETERS.filter((_, i) => (flags & (1 << i)) !== 0)
			};
		});
}

function medianOf(
	name: string,
	columns: readonly BiasColumn[],
	devices: readonly number[]
): MedianSweep {
	return {
		name,
		devices: devices.length,
		capacitances: columns.map(({ values }) => {
			const sorted = Float64Array.from(devices, (device) => values[device]!)
				.filter((value) => !Number.isNaN(value))
				.sort();
			return sorted.length === 0 ? null : quantile(sorted, 0.5);
		})
	};
}
