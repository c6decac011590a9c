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

	const grid = columns.map(({ bias }) => bias);
	const between = grid.length < 2 ? [] : biasesBetween(grid, asked(grid));
	if (between.length === 0) return { measured, interpolated: [], joint };
	const curve = measured.map((of) => ({
		bias: readConditionKey(of.conditionKey).reverseVoltage ?? 0,
		median: medianOf(of)
	}));
	const potential = straighteningPotential(
		curve.map(({ bias }) => bias),
		curve.map(({ median }) => median)
	);
	const filled = await gather(db, basis, devices, sweepKey, (matrix) =>
		interpolateSweeps(matrix, between, potential)
	);
	return {
		measured,
		interpolated: filled.flatMap((column) => summarize(column, potential) ?? []),
		joint
	};
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
