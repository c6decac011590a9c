import { mean as meanOf } from '../stats/mean';
import { quantile } from '../stats/quantile';
import { skewness } from '../stats/skewness';
import { sortNumbers } from '../stats/sortNumbers';
import { censoringOf } from './censorReadings';
import { componentsOf } from './componentsOf';
import { TransformDomainError } from './errors';
import { extremesOf } from './extremes';
import { groupMembers, type Members, type TransformedMembers } from './groupMembers';
import type { GroupName } from './indexDevices';
import type { Censoring, Distribution, DistributionSummary, Group, Transform } from './summary';
import { transformNumbers } from './transformNumbers';
import { withinLotNormality } from './withinLotNormality';

/** Where the stored quantiles lie: the extremes, the tails a limit speaks of, and every 5 %. */
export const STORED_PROBABILITIES: readonly number[] = [
	0, 0.001, 0.005, 0.01, 0.025, 0.05, 0.1, 0.15, 0.2, 0.25, 0.3, 0.35, 0.4, 0.45, 0.5, 0.55, 0.6,
	0.65, 0.7, 0.75, 0.8, 0.85, 0.9, 0.95, 0.975, 0.99, 0.995, 0.999, 1
];

export interface DistributionInput {
	readonly characteristic: string;
	readonly conditionKey: string;
	/** SI unit of the values. */
	readonly unit: string;
	readonly transform: Transform;
	/** One value a device in SI units; NaN for a device without one. */
	readonly values: Float64Array;
	/** What each value says: at most (−1), exactly (0), at least (1). Without it all are exact. */
	readonly censored?: Int8Array;
	/** The group of each device, an index into `groups`. */
	readonly groupOf: Int32Array;
	readonly groups: readonly GroupName[];
	readonly sets: readonly number[];
	readonly uncertainty: number | null;
	readonly excluded: number;
	readonly quarantined: number;
	/** V_j in V with which the values were interpolated; left out where the bias was measured. */
	readonly junctionPotential?: number;
}

/**
 * Sums up a characteristic at one condition: y is the transformed value; mean and spread in total,
 * and n, mean and Σ(y − mean)² of each lot and wafer, from which every limit that rests on
 * normality is arithmetic; the outermost devices, from which order statistics are. The spread is
 * divided by n − 1.
 *
 * Censored devices count in n, lots, quantiles and extremes, where they stand at their bound. Mean,
 * spread and groups are those of the observed devices. When none was observed, the mean is that of
 * the bounds, the spread 0, and there are no groups.
 *
 * Values are sorted before they are added, so the result is the same to the last bit in whatever
 * order devices and sets come.
 *
 * @returns `undefined` when no device has a value
 * @throws {TransformDomainError} for a value whose logarithm does not exist
 * @throws {CensoringError} when readings are censored below a floor that is not below the ceiling
 */
export function computeDistribution(input: DistributionInput): Distribution | undefined {
	const { transform, values, censored } = input;
	const censoring = censored && censoringOf({ values, censored });
	const bounded = withinBounds(values, censoring);
	const sorted = sortNumbers(presentOf(bounded));
	if (sorted.length === 0) return undefined;
	const lowest = sorted[0] ?? Number.NaN;
	if (transform !== 'identity' && lowest <= 0) throw new TransformDomainError(transform, lowest);

	const observed = observedOf(sorted, censoring);
	const all = groupMembers(bounded, input.groupOf, input.groups);
	const exact = censoring ? all.flatMap((of) => observedMembers(of, censoring)) : all;
	const members = exact.map((of) => ({
		...of,
		transformed: transformNumbers(of.sorted, transform)
	}));
	const groups = members.map(sumsOf);
	const transformed = transformNumbers(observed.length === 0 ? sorted : observed, transform);
	const mean = meanOf(transformed);
	const sumOfSquares = sum(
		groups.map((of) => of.sumOfSquares + of.sampleSize * (of.mean - mean) ** 2)
	);

	return {
		characteristic: input.characteristic,
		conditionKey: input.conditionKey,
		unit: input.unit,
		transform,
		sampleSize: sorted.length,
		independentLots: new Set(all.map(({ name }) => name.waferLot)).size,
		wafers: all.length,
		mean,
		standardDeviation: observed.length > 1 ? Math.sqrt(sumOfSquares / (observed.length - 1)) : 0,
		// Two devices can't lean to a side.
		skewness: observed.length < 3 ? 0 : skewness(transformed),
		quantiles: quantilesOf(sorted, censoring),
		interpolated: input.junctionPotential !== undefined,
		...(input.junctionPotential !== undefined && { junctionPotential: input.junctionPotential }),
		sets: [...input.sets],
		uncertainty: input.uncertainty,
		excluded: input.excluded,
		quarantined: input.quarantined,
		origin: 'measured',
		...(censoring && { censoring }),
		normality: censoring ? null : withinLotNormality(members),
		components: censoring ? null : componentsOf(groups),
		groups,
		extremes: extremesOf(sorted)
	};
}

function presentOf(values: Float64Array): Float64Array {
	const present = new Float64Array(values.length);
	let count = 0;
	for (let i = 0; i < values.length; i++)
		if (!Number.isNaN(values[i]!)) present[count++] = values[i]!;
	return present.subarray(0, count);
}

/** Every device beyond a bound stands at the bound. */
function withinBounds(values: Float64Array, censoring: Censoring | undefined): Float64Array {
	if (censoring === undefined) return values;
	const { floor, ceiling } = censoring;
	return values.map((value) => Math.min(Math.max(value, floor ?? -Infinity), ceiling ?? Infinity));
}

/** The devices between the bounds. @param sorted ascending */
function observedOf(sorted: Float64Array, censoring: Censoring | undefined): Float64Array {
	if (censoring === undefined) return sorted;
	return sorted.subarray(censoring.atOrBelow, sorted.length - censoring.atOrAbove);
}

function observedMembers({ name, sorted }: Members, { floor, ceiling }: Censoring): Members[] {
	const observed = sorted.filter(
		(value) => value > (floor ?? -Infinity) && value < (ceiling ?? Infinity)
	);
	return observed.length === 0 ? [] : [{ name, sorted: observed }];
}

/** Two passes: the mean first, then the squares around it. */
function sumsOf({ name, sorted, transformed }: TransformedMembers): Group {
	const mean = meanOf(transformed);
	let sumOfSquares = 0;
	for (let i = 0; i < transformed.length; i++) sumOfSquares += (transformed[i]! - mean) ** 2;
	return {
		lot: name.lot,
		waferLot: name.waferLot,
		wafer: name.wafer,
		sampleSize: transformed.length,
		mean,
		sumOfSquares,
		lowest: sorted[0] ?? Number.NaN,
		highest: sorted.at(-1) ?? Number.NaN
	};
}

function quantilesOf(
	sorted: Float64Array,
	censoring: Censoring | undefined
): DistributionSummary['quantiles'] {
	if (censoring === undefined) {
		return STORED_PROBABILITIES.map((probability) => ({
			probability,
			value: quantile(sorted, probability)
		}));
	}
	// The weight of censored devices in a quantile is the same quantile of "is censored".
	const { atOrBelow, atOrAbove } = censoring;
	const below = sorted.map((_, rank) => (rank < atOrBelow ? 1 : 0));
	const above = sorted.map((_, rank) => (rank < sorted.length - atOrAbove ? 0 : 1));
	return STORED_PROBABILITIES.map((probability) => ({
		probability,
		value: quantile(sorted, probability),
		...(quantile(below, probability) > 0 && { bound: 'atMost' as const }),
		...(quantile(above, probability) > 0 && { bound: 'atLeast' as const })
	}));
}

function sum(numbers: ArrayLike<number> & Iterable<number>): number {
	let total = 0;
	for (const number of numbers) total += number;
	return total;
}
