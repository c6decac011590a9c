import { groupBy } from '../groupBy';
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

/** Devices with a value at every bias, packed row by row, lot by lot. */
interface CompleteRows {
	readonly biases: readonly number[];
	readonly rows: Float64Array;
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
	const { biases, rows, lotSizes } = completeRows(input);
	const points = biases.length;
	const devices = lotSizes.reduce((sum, size) => sum + size, 0);
	if (points === 0 || devices < 2) return undefined;

	const lotMeans = new Float64Array(lotSizes.length * points);
	const withinLots = new Float64Array(points * points);
	let first = 0;
	for (const [lot, size] of lotSizes.entries()) {
		const ofLot = rows.subarray(first * points, (first + size) * points);
		const means = lotMeans.subarray(lot * points, (lot + 1) * points);
		centre(ofLot, means);
		addProducts(withinLots, ofLot, points);
		first += size;
	}
	const degrees = devices - lotSizes.length;
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
	const transformed = used.map(({ values }) => values.map(TRANSFORMS[transform].apply));
	const lots = groupBy(
		[...groupOf.keys()].filter((device) =>
			transformed.every((values) => !Number.isNaN(values[device]))
		),
		(device) => groups[groupOf[device] ?? -1]?.waferLot ?? ''
	);
	const ordered = [...lots]
		.sort(([a], [b]) => (a < b ? -1 : 1))
		.map(([, devices]) => devices.sort((a, b) => byValues(transformed, a, b)));
	const rows = new Float64Array(ordered.flat().length * used.length);
	for (const [row, device] of ordered.flat().entries()) {
		for (let p = 0; p < used.length; p++) rows[row * used.length + p] = transformed[p]![device]!;
	}
	return {
		biases: used.map(({ bias }) => bias),
		rows,
		lotSizes: ordered.map((devices) => devices.length)
	};
}

function countPresent(values: Float64Array): number {
	let count = 0;
	for (let i = 0; i < values.length; i++) if (!Number.isNaN(values[i])) count++;
	return count;
}

function byValues(columns: readonly Float64Array[], a: number, b: number): number {
	for (const values of columns) {
		const difference = values[a]! - values[b]!;
		if (difference !== 0) return difference;
	}
	return 0;
}

/** Takes the mean at each point off all rows, in two passes for what rounding leaves over. */
function centre(rows: Float64Array, means: Float64Array): void {
	const points = means.length;
	const count = rows.length / points;
	for (let pass = 0; pass < 2; pass++) {
		for (let p = 0; p < points; p++) {
			let sum = 0;
			for (let i = p; i < rows.length; i += points) sum += rows[i]!;
			const mean = sum / count;
			for (let i = p; i < rows.length; i += points) rows[i]! -= mean;
			means[p]! += mean;
		}
	}
}

/** Adds Σ y yᵀ over the rows, both triangles. */
function addProducts(sums: Float64Array, rows: Float64Array, points: number): void {
	for (let first = 0; first < rows.length; first += points) {
		for (let p = 0; p < points; p++) {
			const factor = rows[first + p]!;
			for (let q = 0; q <= p; q++) sums[p * points + q]! += factor * rows[first + q]!;
		}
	}
	for (let p = 0; p < points; p++)
		for (let q = 0; q < p; q++) sums[q * points + p] = sums[p * points + q]!;
}
