import { findCharacteristic } from '$lib/core/characteristics/catalogue';
import { conditionKey as keyOf, type Condition } from '$lib/core/characteristics/condition';
import { computeDistribution } from '$lib/core/distributions/computeDistribution';
import type { BiasColumn } from '$lib/core/distributions/conditionColumns';
import { derivedCharge } from '$lib/core/distributions/derivedCharge';
import { derivedCoefficient } from '$lib/core/distributions/derivedCoefficient';
import type { DerivedColumn } from '$lib/core/distributions/derivedColumn';
import { derivedQuality } from '$lib/core/distributions/derivedQuality';
import { derivedRatio } from '$lib/core/distributions/derivedRatio';
import type { DeviceIndex } from '$lib/core/distributions/indexDevices';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import type { Distribution } from '$lib/core/distributions/summary';
import { measuredKey } from '$lib/core/measurements/measuredKey';
import type { Database } from '../db/database';
import type { DerivedWanted } from './derivedWanted';
import type { Basis } from './readBasis';
import { readingsOf, type ReadingSeriesKey } from './readReadings';
import { setFacts, type SetFacts } from './setFacts';

type DerivedKey = 'C_ratio' | 'Q_C' | 'E_C' | 'Q' | 'α_C';

interface Owner {
	readonly basis: Basis;
	readonly devices: DeviceIndex;
}

/** The capacitances of one temperature and frequency at some measured biases. */
export interface SweptColumns {
	readonly sweepKey: string;
	readonly columns: readonly BiasColumn[];
}

/**
 * What is computed of the sweeps at one temperature and frequency, device by device: ratios, and
 * charge and energy to the highest bias and to those named.
 *
 * The uncertainty of a ratio is that of both capacitances together: a common error of gain would
 * cancel, but nobody states how much of it is common.
 */
export function sweptDerived(
	{ basis, devices }: Owner,
	{ sweepKey, columns }: SweptColumns,
	wanted: DerivedWanted
): Distribution[] {
	const at = readConditionKey(sweepKey);
	const columnAt = (bias: number) => columns.find((of) => of.bias === bias);
	const facts = setFacts(basis, sweepKey);
	const sumUp = (key: DerivedKey, condition: Condition, column: DerivedColumn, factor = 1) => {
		const stated = facts.of(column.sets);
		const uncertainty = stated.uncertainty === null ? null : factor * stated.uncertainty;
		return summed(devices, key, condition, column, { ...stated, uncertainty });
	};
	const ratios = wanted.ratios.flatMap(([low, high]) => {
		const [atLow, atHigh] = [columnAt(low), columnAt(high)];
		if (atLow === undefined || atHigh === undefined) return [];
		const condition = { ...at, reverseVoltage: low, secondReverseVoltage: high };
		return sumUp('C_ratio', condition, derivedRatio(atLow, atHigh), 2);
	});
	const highest = Math.max(0, ...columns.map(({ bias }) => bias));
	const charges = derivedCharge(columns, [...new Set([...wanted.charges, highest])]).flatMap(
		({ bias, charge, energy }) => [
			...sumUp('Q_C', { ...at, reverseVoltage: bias }, charge),
			...sumUp('E_C', { ...at, reverseVoltage: bias }, energy)
		]
	);
	return [...ratios, ...charges];
}

/**
 * The temperature coefficients at each bias that was measured at two temperatures or more of one
 * frequency. It is kept at the temperature nearest to 25 °C. An error of gain cancels in it and
 * nobody states another, so that its uncertainty isn't stated.
 */
export function coefficientsDerived(
	{ basis, devices }: Owner,
	swept: readonly SweptColumns[],
	wanted: DerivedWanted
): Distribution[] {
	const conditions = swept.map((of) => ({ ...of, at: readConditionKey(of.sweepKey) }));
	const frequencies = [...new Set(conditions.map(({ at }) => at.frequency))];
	return frequencies.flatMap((frequency) =>
		wanted.coefficients.flatMap((bias) => {
			const there = conditions.flatMap(({ sweepKey, columns, at }) => {
				const column = at.frequency === frequency && columns.find((of) => of.bias === bias);
				return column ? [{ sweepKey, temperatureCelsius: at.temperatureCelsius, column }] : [];
			});
			const column = derivedCoefficient(there);
			if (column === undefined) return [];
			const nearest = there.reduce((best, of) =>
				Math.abs(of.temperatureCelsius - 25) < Math.abs(best.temperatureCelsius - 25) ? of : best
			);
			const facts = there.map((of) => setFacts(basis, of.sweepKey).of(column.sets));
			return summed(
				devices,
				'α_C',
				{ ...readConditionKey(nearest.sweepKey), reverseVoltage: bias },
				column,
				{ ...togetherOf(facts), uncertainty: null }
			);
		})
	);
}

/**
 * The quality factors, at each condition of a series resistance read at a reverse bias where the
 * same temperature has one frequency of sweeps, or sweeps at the frequency of the resistance.
 */
export async function qualityDerived(
	db: Database,
	{ basis, devices }: Owner,
	swept: readonly SweptColumns[],
	readings: readonly ReadingSeriesKey[]
): Promise<Distribution[]> {
	const found: Distribution[] = [];
	for (const series of readings.filter(({ characteristic }) => characteristic === 'r_s')) {
		const at = readConditionKey(series.conditionKey);
		const { frequency, reverseVoltage } = at;
		const capacitance = capacitanceFor(at, swept);
		if (frequency === undefined || reverseVoltage === undefined || capacitance === undefined)
			continue;
		const ofResistance = setFacts(
			basis,
			measuredKey({ of: series.characteristic, conditionKey: series.conditionKey })
		);
		const resistance = await readingsOf(
			db,
			basis.inputs.sets.map(({ id }) => id),
			{ ...series, devices, isLeftOut: ofResistance.isLeftOut }
		);
		const column = derivedQuality(frequency, capacitance.column, resistance);
		const condition = { temperatureCelsius: at.temperatureCelsius, frequency, reverseVoltage };
		const stated = [
			ofResistance.of(resistance.sets),
			setFacts(basis, capacitance.sweepKey).of(capacitance.column.sets)
		];
		found.push(...summed(devices, 'Q', condition, column, togetherOf(stated)));
	}
	return found;
}

function capacitanceFor(at: Condition, swept: readonly SweptColumns[]) {
	if (at.forwardCurrent !== undefined) return undefined;
	const here = swept.flatMap(({ sweepKey, columns }) => {
		const condition = readConditionKey(sweepKey);
		const column = columns.find(({ bias }) => bias === at.reverseVoltage);
		return condition.temperatureCelsius === at.temperatureCelsius && column !== undefined
			? [{ sweepKey, frequency: condition.frequency, column }]
			: [];
	});
	return here.length === 1 ? here[0] : here.find(({ frequency }) => frequency === at.frequency);
}

/** Of several things that were measured: their uncertainties add up, and so do those left out. */
function togetherOf(facts: readonly SetFacts[]): SetFacts {
	const stated = facts.flatMap(({ uncertainty }) => (uncertainty === null ? [] : [uncertainty]));
	return {
		uncertainty: stated.length < facts.length ? null : stated.reduce((sum, one) => sum + one, 0),
		excluded: facts.reduce((sum, of) => sum + of.excluded, 0),
		quarantined: facts.reduce((sum, of) => sum + of.quarantined, 0)
	};
}

function summed(
	devices: DeviceIndex,
	key: DerivedKey,
	condition: Condition,
	{ values, censored, sets }: DerivedColumn,
	facts: SetFacts
): Distribution[] {
	const characteristic = findCharacteristic(key);
	if (characteristic === undefined) throw new RangeError(`the catalogue requires ${key}`);
	const found = computeDistribution({
		characteristic: key,
		conditionKey: keyOf(condition),
		unit: characteristic.unit,
		transform: characteristic.transform,
		values,
		...(censored && { censored }),
		groupOf: devices.groupOf,
		groups: devices.groups,
		sets,
		...facts
	});
	return found === undefined ? [] : [found];
}
