import { computeDistribution } from '../distributions/computeDistribution';
import type { Distribution } from '../distributions/summary';
import type { LimitRowOptions } from './computeLimitRow';
import type { LimitPolicy } from './policy';

/** A distribution of made-up lots at 25 °C and 4 V; values in pF. */
export function withValues(
	lots: readonly (readonly number[])[],
	change: Partial<Distribution> = {}
): Distribution {
	const names = lots.map((_, lot) => String.fromCharCode(65 + lot));
	const distribution = computeDistribution({
		characteristic: 'C_tot',
		conditionKey: 'T=25;f=1000000;VR=4',
		unit: 'F',
		transform: 'ln',
		values: Float64Array.from(lots.flat(), (value) => value * 1e-12),
		groupOf: Int32Array.from(lots.flatMap((lot, group) => lot.map(() => group))),
		groups: names.map((lot) => ({ lot, waferLot: lot, wafer: '1' })),
		sets: [1],
		uncertainty: 0,
		excluded: 0,
		quarantined: 0
	});
	if (distribution === undefined) throw new RangeError('a distribution requires a device');
	return { ...distribution, ...change };
}

/** Twelve devices of three lots that differ a little. */
export function threeSmallLots(change: Partial<Distribution> = {}): Distribution {
	return withValues(
		[
			[14.71, 14.93, 15.02, 14.88],
			[15.21, 15.4, 15.11],
			[14.5, 14.62, 14.99, 14.7, 14.81]
		],
		change
	);
}

/** Content 0.99, confidence 0.95, each side on its own, three figures, no gate in the way. */
export const PLAIN_POLICY: LimitPolicy = {
	name: 'Plain',
	method: 'normal',
	content: 0.99,
	confidence: 0.95,
	tails: 'each',
	span: 'each-bias',
	minimumLots: 1,
	minimumDevices: 2,
	drift: 0,
	uncertaintyTreatment: 'outwards',
	resolution: { significantFigures: 3 }
};

export const AT_FOUR_VOLTS: LimitRowOptions = {
	policyVersion: 1,
	condition: { temperatureCelsius: 25, frequency: 1e6, reverseVoltage: 4 },
	unit: 'pF',
	unitScale: 1e-12,
	inputHash: 'test'
};
