import type { BiasColumn } from './conditionColumns';
import type { GroupName } from './indexDevices';
import type { JointDistribution } from './jointDistribution';
import type { Transform } from './summary';
import { TRANSFORMS } from './transforms';

/** A bias that fewer of the devices have, relative to the best measured one, is left out. */
const COVERAGE = 0.9;

export interface JointInput {
	readonly characteristic: string;
	/** Temperature and frequency, without a bias. */
	readonly conditionKey: string;
	readonly unit: string;
	readonly transform: Transform;
	/** Ascending in bias. */
	readonly columns: readonly BiasColumn[];
	/** The group of each device, an index into `groups`. */
	readonly groupOf: Int32Array;
	readonly groups: readonly GroupName[];
}

/** Devices with a value at every bias, row by row, lot by lot. */
interface CompleteRows {
	readonly biases: readonly number[];
	readonly rows: readonly Float64Array[];
	/** How many rows each independent lot has, in the order of the rows. */
	readonly lotSizes: readonly number[];
}

/**
 * How the values at different biases of one temperature and frequency vary together, over the
 * devices that have all of them. Biases that only some sets measured (fewer than nine tenths of the
 * devices) are left out, so that they don't take the devices of the other sets with them.
 *
 * Devices are put into one order before they are added up: the result is the same to the last bit in
 * whatever order they come.
 *
 * @returns `undefined` for fewer than two complete devices
 */
export function computeJointDistribution(input: JointInput): JointDistribution | undefined {
	const complete = completeRows(input);
	const { biases, rows, lotSizes } = complete;
	if (rows.length < 2) return undefined;

	const points = biases.length;
	const lotMeans = new Float64Array(lotSizes.length * points);
	const withinLots = new Float64Array(points * points);
	let first = 0;
	for (const [lot, size] of lotSizes.entries()) {
		const devices = rows.slice(first, first + size);
		const means = meansOf(devices, points);
		lotMeans.set(means, lot * points);
		addProducts(withinLots, devices, means);
		first += size;
	}
	const degrees = rows.length - lotSizes.length;
	if (degrees > 0) for (const [i, sum] of withinLots.entries()) withinLots[i] = sum / degrees;
	return {
		characteristic: input.characteristic,
		conditionKey: input.conditionKey,
		unit: input.unit,
		transform: input.transform,
		biases,
		lotSizes,
		lotMeans,
		withinLots
	};
}

function completeRows({ columns, groupOf, groups, transform }: JointInput): CompleteRows {
	const counts = columns.map(({ values }) => countPresent(values));
	const most = Math.max(0, ...counts);
	const used = columns.filter((_, column) => (counts[column] ?? 0) >= COVERAGE * most);
	const { apply } = TRANSFORMS[transform];
	const lots = new Map<string, Float64Array[]>();
	const devices = used[0]?.values.length ?? 0;
	for (let device = 0; device < devices; device++) {
		if (used.some(({ values }) => Number.isNaN(values[device]))) continue;
		const row = Float64Array.from(used, ({ values }) => apply(values[device] ?? Number.NaN));
		const lot = groups[groupOf[device] ?? -1]?.waferLot ?? '';
		const rows = lots.get(lot);
		if (rows) rows.push(row);
		else lots.set(lot, [row]);
	}
	const ordered = [...lots]
		.sort(([a], [b]) => (a < b ? -1 : 1))
		.map(([, rows]) => rows.sort(byValues));
	return {
		biases: used.map(({ bias }) => bias),
		rows: ordered.flat(),
		lotSizes: ordered.map((rows) => rows.length)
	};
}

function countPresent(values: Float64Array): number {
	let count = 0;
	for (const value of values) if (!Number.isNaN(value)) count++;
	return count;
}

function byValues(a: Float64Array, b: Float64Array): number {
	for (let p = 0; p < a.length; p++) {
		const difference = a[p]! - b[p]!;
		if (difference !== 0) return difference;
	}
	return 0;
}

/** Mean at each point, with a second pass for what rounding left over. */
function meansOf(rows: readonly Float64Array[], points: number): Float64Array {
	const means = new Float64Array(points);
	for (let pass = 0; pass < 2; pass++) {
		const rest = new Float64Array(points);
		for (const row of rows) for (let p = 0; p < points; p++) rest[p]! += row[p]! - means[p]!;
		for (let p = 0; p < points; p++) means[p]! += rest[p]! / rows.length;
	}
	return means;
}

/** Adds Σ (y − mean)(y − mean)ᵀ, both triangles. */
function addProducts(sums: Float64Array, rows: readonly Float64Array[], means: Float64Array): void {
	const points = means.length;
	const off = new Float64Array(points);
	for (const row of rows) {
		for (let p = 0; p < points; p++) off[p] = row[p]! - means[p]!;
		for (let p = 0; p < points; p++) {
			const factor = off[p]!;
			for (let q = 0; q <= p; q++) sums[p * points + q]! += factor * off[q]!;
		}
	}
	for (let p = 0; p < points; p++)
		for (let q = 0; q < p; q++) sums[q * points + p] = sums[p * points + q]!;
}
