import { CHARACTERISTICS } from '$lib/core/characteristics/catalogue';
import { conditionKey, type Condition } from '$lib/core/characteristics/condition';
import type { Distribution } from '$lib/core/distributions/summary';
import { activationEnergy } from '$lib/core/junction/activationEnergy';
import { forwardFamily, type ForwardResult } from '$lib/core/junction/forwardFamily';
import type { Basis } from '$lib/core/limits/basis';
import { medianOf } from '$lib/core/limits/typicalValue';
import { CURRENT_SWEEP } from '$lib/core/measurements/measuredKey';
import type { Connection } from '../db/database';
import { findCharacteristicDistributions } from '../db/findCharacteristicDistributions';
import { characteristicLimits, type CharacteristicLimits } from './characteristicLimits';

/** Every limit of one reading or derived characteristic. */
export type CharacteristicGroup = Exclude<CharacteristicLimits, { readonly status: 'refused' }>;

/** The medians of a current at one temperature. */
export interface CurrentFamily {
	readonly temperatureCelsius: number;
	/** Most devices at any bias. */
	readonly devices: number;
	/** Forward voltage in V and current in A, rising. */
	readonly forward: readonly (readonly [number, number])[];
	/** Reverse voltage in V and current in A, rising. */
	readonly reverse: readonly (readonly [number, number])[];
	readonly extracted: ForwardResult;
}

/** The reverse current of one bias at several temperatures. */
export interface LeakageByTemperature {
	/** In V. */
	readonly reverseVoltage: number;
	readonly points: readonly { readonly temperatureCelsius: number; readonly median: number }[];
	/** Temperatures of which the median rests on censored readings. */
	readonly leftOut: readonly number[];
	/** In eV. */
	readonly energy: number;
}

export interface CharacteristicsScreen {
	readonly groups: readonly CharacteristicGroup[];
	readonly families: readonly CurrentFamily[];
	readonly leakage: readonly LeakageByTemperature[];
}

/** 0 °C in K. */
const CELSIUS = 273.15;

/** Readings, derived characteristics, families of currents and leakage of a product, all summaries. */
export async function characteristicsScreen(
	db: Connection,
	asked: {
		readonly product: number;
		readonly basisHash: string;
		readonly policyVersion: number;
		readonly declaredBasis: Basis;
	}
): Promise<CharacteristicsScreen> {
	const groups: CharacteristicGroup[] = [];
	for (const { key, measuredAs } of CHARACTERISTICS) {
		if (measuredAs === 'sweep') continue;
		const found = await characteristicLimits(db, { ...asked, characteristic: key });
		if (!('status' in found)) groups.push(found);
	}
	const currents = await findCharacteristicDistributions(db, {
		...asked,
		characteristic: CURRENT_SWEEP
	});
	const leakage = groups.find(({ characteristic }) => characteristic.key === 'I_R');
	return {
		groups,
		families: familiesOf(currents),
		leakage: leakage === undefined ? [] : leakageOf(leakage.distributions)
	};
}

interface Stored {
	readonly condition: Condition;
	readonly distribution: Distribution;
}

function familiesOf(stored: readonly Stored[]): CurrentFamily[] {
	const temperatures = [...new Set(stored.map(({ condition }) => condition.temperatureCelsius))];
	return temperatures.map((temperatureCelsius) => {
		const points = stored
			.filter(({ condition }) => condition.temperatureCelsius === temperatureCelsius)
			.flatMap(({ condition: { reverseVoltage }, distribution }) =>
				reverseVoltage === undefined
					? []
					: [{ bias: reverseVoltage, current: medianOf(distribution), of: distribution }]
			);
		const forward = points
			.filter(({ bias, current }) => bias < 0 && current < 0)
			.map(({ bias, current }) => [-bias, -current] as const)
			.sort(([a], [b]) => a - b);
		return {
			temperatureCelsius,
			devices: Math.max(...points.map(({ of }) => of.sampleSize)),
			forward,
			reverse: points
				.filter(({ bias, current }) => bias > 0 && current > 0)
				.map(({ bias, current }) => [bias, current] as const),
			extracted: forwardFamily(forward, temperatureCelsius + CELSIUS)
		};
	});
}

function leakageOf(stored: readonly Stored[]): LeakageByTemperature[] {
	const byPlace = new Map<string, Stored[]>();
	for (const one of stored) {
		const place = conditionKey({ ...one.condition, temperatureCelsius: 0 });
		byPlace.set(place, [...(byPlace.get(place) ?? []), one]);
	}
	return [...byPlace.values()].flatMap((series): LeakageByTemperature[] => {
		const [first] = series;
		const numbers = series.filter(({ distribution }) => !isMedianBound(distribution));
		if (first === undefined || numbers.length < 2) return [];
		const points = numbers.map(({ condition, distribution }) => ({
			temperatureCelsius: condition.temperatureCelsius,
			median: medianOf(distribution)
		}));
		return [
			{
				reverseVoltage: first.condition.reverseVoltage ?? 0,
				points,
				leftOut: series
					.filter(({ distribution }) => isMedianBound(distribution))
					.map((of) => of.condition.temperatureCelsius),
				energy: activationEnergy(
					points.map((point) => point.temperatureCelsius + CELSIUS),
					points.map(({ median }) => median)
				)
			}
		];
	});
}

const isMedianBound = ({ quantiles }: Distribution) =>
	quantiles.find(({ probability }) => probability === 0.5)?.bound !== undefined;
