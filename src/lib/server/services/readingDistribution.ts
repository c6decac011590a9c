import { findCharacteristic } from '$lib/core/characteristics/catalogue';
import { computeDistribution } from '$lib/core/distributions/computeDistribution';
import type { DeviceIndex } from '$lib/core/distributions/indexDevices';
import type { Distribution } from '$lib/core/distributions/summary';
import { measuredKey } from '$lib/core/measurements/measuredKey';
import type { Database } from '../db/database';
import type { Basis } from './readBasis';
import { readingsOf, type ReadingSeriesKey } from './readReadings';
import { setFacts } from './setFacts';

/**
 * The distribution of single readings of a characteristic at one condition: leakage, breakdown
 * voltage … with what each device's reading says, a number or a bound.
 *
 * @returns `undefined` when no device has a reading, and for a characteristic no longer listed
 */
export async function readingDistribution(
	db: Database,
	basis: Basis,
	devices: DeviceIndex,
	{ characteristic: key, conditionKey }: ReadingSeriesKey
): Promise<Distribution | undefined> {
	const characteristic = findCharacteristic(key);
	if (characteristic === undefined) return undefined;
	const facts = setFacts(basis, measuredKey({ of: key, conditionKey }));
	const { values, censored, sets } = await readingsOf(
		db,
		basis.inputs.sets.map(({ id }) => id),
		{ characteristic: key, conditionKey, devices, isLeftOut: facts.isLeftOut }
	);
	return computeDistribution({
		characteristic: key,
		conditionKey,
		unit: characteristic.unit,
		transform: characteristic.transform,
		values,
		censored,
		groupOf: devices.groupOf,
		groups: devices.groups,
		sets,
		...facts.of(sets)
	});
}
