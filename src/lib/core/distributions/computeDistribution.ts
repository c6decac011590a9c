import { mean as meanOf } from '../stats/mean';
import { quantile } from '../stats/quantile';
import { skewness } from '../stats/skewness';
import { TransformDomainError } from './errors';
import type { GroupName } from './indexDevices';
import type { Distribution, Group, Transform } from './summary';
import { TRANSFORMS } from './transforms';

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
	/** The group of each device, an index into `groups`. */
	readonly groupOf: Int32Array;
	readonly groups: readonly GroupName[];
	readonly sets: readonly number[];
	readonly uncertainty: number | null;
	readonly excluded: number;
	readonly quarantined: number;
}

/**
 * Sums up a characteristic at one condition: y is the transformed value; mean and spread in total,
 * and n, mean and Σ(y − mean)² of each lot and wafer, from which every limit that rests on
 * normality is arithmetic. The spread is divided by n − 1.
 *
 * Values are sorted before they are added, so the result is the same to the last bit in whatever
 * order devices and sets come.
 *
 * @returns `undefined` when no device has a value
 * @throws {TransformDomainError} for a value whose logarithm does not exist
 */
export function computeDistribution(input: DistributionInput): Distribution | undefined {
	const { transform, values } = input;
	const sorted = presentValues(values).sort();
	if (sorted.length === 0) return undefined;
	const lowest = sorted[0] ?? Number.NaN;
	if (transform !== 'identity' && lowest <= 0) throw new TransformDomainError(transform, lowest);

	const groups = summarizeGroups(input);
	const sampleSize = sorted.length;
	const transformed = sorted.map(TRANSFORMS[transform].apply);
	const mean = meanOf(transformed);
	const sumOfSquares = sum(
		groups.map((of) => of.sumOfSquares + of.sampleSize * (of.mean - mean) ** 2)
	);

	return {
		characteristic: input.characteristic,
		conditionKey: input.conditionKey,
		unit: input.unit,
		transform,
		sampleSize,
		independentLots: new Set(groups.map((of) => of.waferLot)).size,
		wafers: groups.length,
		mean,
		standardDeviation: sampleSize > 1 ? Math.sqrt(sumOfSquares / (sampleSize - 1)) : 0,
		// Two devices can't lean to a side.
		skewness: sampleSize < 3 ? 0 : skewness(transformed),
		quantiles: STORED_PROBABILITIES.map((probability) => ({
			probability,
			value: quantile(sorted, probability)
		})),
		interpolated: false,
		sets: [...input.sets],
		uncertainty: input.uncertainty,
		excluded: input.excluded,
		quarantined: input.quarantined,
		groups
	};
}

function presentValues(values: Float64Array): Float64Array {
	return values.filter((value) => !Number.isNaN(value));
}

/** Two passes within each group: the mean first, then the squares around it. */
function summarizeGroups({ values, groupOf, groups, transform }: DistributionInput): Group[] {
	const sizes = new Int32Array(groups.length);
	for (const [device, value] of values.entries()) {
		if (!Number.isNaN(value)) sizes[groupOf[device] ?? -1]! += 1;
	}
	const members = groups.map((_, group) => new Float64Array(sizes[group] ?? 0));
	const filled = new Int32Array(groups.length);
	for (const [device, value] of values.entries()) {
		if (Number.isNaN(value)) continue;
		const group = groupOf[device] ?? -1;
		members[group]![filled[group]!++] = value;
	}

	const { apply } = TRANSFORMS[transform];
	return groups.flatMap((name, group) => {
		const sorted = members[group]?.sort() ?? new Float64Array();
		const [lowest] = sorted;
		const highest = sorted.at(-1);
		if (lowest === undefined || highest === undefined) return [];
		const transformed = sorted.map(apply);
		const mean = meanOf(transformed);
		return [
			{
				lot: name.lot,
				waferLot: name.waferLot,
				wafer: name.wafer,
				sampleSize: transformed.length,
				mean,
				sumOfSquares: sum(transformed.map((y) => (y - mean) ** 2)),
				lowest,
				highest
			}
		];
	});
}

function sum(numbers: ArrayLike<number> & Iterable<number>): number {
	let total = 0;
	for (const number of numbers) total += number;
	return total;
}
