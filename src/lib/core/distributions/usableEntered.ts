import { conditionKey as keyOf } from '../characteristics/condition';
import { readConditionKey } from './readConditionKey';

interface Measured {
	/** The conditions at which devices were measured, biases included. */
	readonly keys: readonly string[];
	/** Whether they are sweeps, which speak for biases between those that were measured, too. */
	readonly areSweeps: boolean;
}

/**
 * Entered distributions that stand where devices say nothing: at a condition without measurements,
 * and for sweeps at a bias outside of the measured range. Inside of it the devices speak, measured
 * or interpolated.
 */
export function usableEntered<Entered extends { readonly conditionKey: string }>(
	entered: readonly Entered[],
	{ keys, areSweeps }: Measured
): Entered[] {
	if (!areSweeps) return entered.filter(({ conditionKey }) => !keys.includes(conditionKey));
	const ranges = new Map<string, { lowest: number; highest: number }>();
	for (const key of keys) {
		const [sweep, bias] = splitKey(key);
		const { lowest, highest } = ranges.get(sweep) ?? { lowest: bias, highest: bias };
		ranges.set(sweep, { lowest: Math.min(lowest, bias), highest: Math.max(highest, bias) });
	}
	return entered.filter(({ conditionKey }) => {
		const [sweep, bias] = splitKey(conditionKey);
		const range = ranges.get(sweep);
		return range === undefined || bias < range.lowest || bias > range.highest;
	});
}

/** The condition without its bias, and the bias. */
function splitKey(key: string): [string, number] {
	const { reverseVoltage = Number.NaN, ...sweep } = readConditionKey(key);
	return [keyOf(sweep), reverseVoltage];
}
