import { conditionKey as keyOf } from '$lib/core/characteristics/condition';
import { biasesBetween } from '$lib/core/distributions/biasesBetween';
import { computeDistribution } from '$lib/core/distributions/computeDistribution';
import { computeJointDistribution } from '$lib/core/distributions/computeJointDistribution';
import {
	ConditionColumns,
	type BiasColumn,
	type SweepMatrix
} from '$lib/core/distributions/conditionColumns';
import type { DeviceIndex } from '$lib/core/distributions/indexDevices';
import { interpolateSweeps } from '$lib/core/distributions/interpolateSweeps';
import type { JointDistribution } from '$lib/core/distributions/jointDistribution';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { straighteningPotential } from '$lib/core/distributions/straighteningPotential';
import type { Distribution } from '$lib/core/distributions/summary';
import { medianOf } from '$lib/core/limits/typicalValue';
import type { Database } from '../db/database';
import { CAPACITANCE, type Basis } from './readBasis';
import { readSweeps } from './readSweeps';
import { setFacts } from './setFacts';

/** What is stored of one temperature and frequency. */
export interface ConditionDistributions {
	/** At every measured bias, ascending. */
	readonly measured: readonly Distribution[];
	/** At the other biases asked for that lie between measured ones. */
	readonly interpolated: readonly Distribution[];
	readonly joint: JointDistribution | undefined;
	/** The capacitances of all devices at every measured bias. */
	readonly columns: readonly BiasColumn[];
}

/**
 * The distributions of one temperature and frequency: sweeps → columns → measured → median curve →
 * V_j → sweeps again, interpolated → columns → interpolated. Blocks are read twice rather than kept:
 * memory holds one block and one condition's columns.
 *
 * @param asked further biases, by those that were measured
 */
export async function conditionDistributions(
	db: Database,
	basis: Basis,
	devices: DeviceIndex,
	{
		sweepKey,
		asked
	}: {
		readonly sweepKey: string;
		readonly asked: (measured: readonly number[]) => readonly number[];
	}
): Promise<ConditionDistributions> {
	const summarize = summarizer(basis, devices, sweepKey);
	const columns = await gather(db, basis, devices, sweepKey, (matrix) => matrix);
	const measured = columns.flatMap((column) => summarize(column) ?? []);
	const joint = computeJointDistribution({
		...CAPACITANCE,
		conditionKey: sweepKey,
		columns,
		groupOf: devices.groupOf,
		groups: devices.groups
	});

	const biases = asked(columns.map(({ bias }) => bias));
	const interpolated = await interpolatedDistributions(db, basis, devices, {
		sweepKey,
		measured,
		biases
	});
	return { measured, interpolated, joint, columns };
}

/**
 * Distributions of one temperature and frequency at biases between measured ones. The junction
 * potential comes from the medians of the measured distributions, so that whenever it is asked a
 * bias gets the same values.
 *
 * @param biases those that were measured, or lie outside of the measured range, are left out
 */
export async function interpolatedDistributions(
	db: Database,
	basis: Basis,
	devices: DeviceIndex,
	{
		sweepKey,
		measured,
		biases
	}: {
		readonly sweepKey: string;
		readonly measured: readonly Distribution[];
		readonly biases: readonly number[];
	}
): Promise<Distribution[]> {
	const grid = measured.map((of) => readConditionKey(of.conditionKey).reverseVoltage ?? 0);
	const between = biasesBetween(grid, biases);
	if (between.length === 0) return [];
	const potential = straighteningPotential(grid, measured.map(medianOf));
	const columns = await gather(db, basis, devices, sweepKey, (matrix) =>
		interpolateSweeps(matrix, between, potential)
	);
	const summarize = summarizer(basis, devices, sweepKey);
	return columns.flatMap((column) => summarize(column, potential) ?? []);
}

/** The columns of a condition, without the sweeps that verdicts or quarantine leave out. */
async function gather(
	db: Database,
	basis: Basis,
	devices: DeviceIndex,
	sweepKey: string,
	view: (matrix: SweepMatrix) => SweepMatrix
): Promise<BiasColumn[]> {
	const { isLeftOut } = setFacts(basis, sweepKey);
	const columns = new ConditionColumns(devices);
	const sets = basis.inputs.sets.map(({ id }) => id);
	for await (const matrix of readSweeps(db, sets, sweepKey)) {
		columns.add(view(matrix), (row) => isLeftOut(matrix.set, row));
	}
	return columns.columns();
}

/** Sums up a column of this condition, with what its sets say of it. */
function summarizer(basis: Basis, devices: DeviceIndex, sweepKey: string) {
	const condition = readConditionKey(sweepKey);
	const facts = setFacts(basis, sweepKey);
	return (
		{ bias, values, sets }: BiasColumn,
		junctionPotential?: number
	): Distribution | undefined =>
		computeDistribution({
			...CAPACITANCE,
			conditionKey: keyOf({ ...condition, reverseVoltage: bias }),
			values,
			groupOf: devices.groupOf,
			groups: devices.groups,
			sets,
			...facts.of(sets),
			...(junctionPotential !== undefined && { junctionPotential })
		});
}
