import { conditionKey as keyOf } from '$lib/core/characteristics/condition';
import { computeDistribution } from '$lib/core/distributions/computeDistribution';
import { ConditionColumns } from '$lib/core/distributions/conditionColumns';
import type { DeviceIndex } from '$lib/core/distributions/indexDevices';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import type { Distribution } from '$lib/core/distributions/summary';
import { CURRENT_SWEEP, measuredKey } from '$lib/core/measurements/measuredKey';
import type { Database } from '../db/database';
import type { Basis } from './readBasis';
import { readSweeps } from './readSweeps';
import { setFacts } from './setFacts';

/**
 * The current at each measured bias of one temperature, in A with the sign of the bias, so that a
 * family of curves is drawn from summaries. Noise around zero has either sign, and the values are
 * summed up as they are.
 */
export async function currentDistributions(
	db: Database,
	basis: Basis,
	devices: DeviceIndex,
	sweepKey: string
): Promise<Distribution[]> {
	const facts = setFacts(basis, measuredKey({ of: CURRENT_SWEEP, conditionKey: sweepKey }));
	const sets = basis.inputs.sets.map(({ id }) => id);
	const columns = new ConditionColumns(devices);
	for await (const matrix of readSweeps(db, sets, sweepKey, 'current'))
		columns.add(matrix, (row) => facts.isLeftOut(matrix.set, row));
	const condition = readConditionKey(sweepKey);
	return columns.columns().flatMap(
		({ bias, values, sets: from }) =>
			computeDistribution({
				characteristic: CURRENT_SWEEP,
				conditionKey: keyOf({ ...condition, reverseVoltage: bias }),
				unit: 'A',
				transform: 'identity',
				values,
				groupOf: devices.groupOf,
				groups: devices.groups,
				sets: from,
				...facts.of(from)
			}) ?? []
	);
}
