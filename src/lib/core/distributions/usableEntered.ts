import { readConditionKey } from './readConditionKey';
import type { Distribution } from './summary';

/**
 * Entered distributions that stand where devices say nothing: at a temperature and frequency without
 * measurements, or at a bias outside of the measured range. Inside of it the devices speak, measured
 * or interpolated.
 *
 * @param measuredKeys the conditions, with their biases, that were measured
 */
export function usableEntered(
	entered: readonly Distribution[],
	measuredKeys: readonly string[]
): Distribution[] {
	const ranges = new Map<string, { lowest: number; highest: number }>();
	for (const key of measuredKeys) {
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

/** Temperature and frequency, and the bias; 0 V where a condition has none. */
function splitKey(key: string): [string, number] {
	const { reverseVoltage = 0, temperatureCelsius, frequency } = readConditionKey(key);
	return [`${temperatureCelsius} ${frequency}`, reverseVoltage];
}
