import { describeCondition } from '$lib/core/characteristics/describeCondition';
import type { Condition } from '$lib/core/characteristics/condition';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { CURRENT_SWEEP, readMeasuredKey } from '$lib/core/measurements/measuredKey';
import { withUnit } from './words';

/** What is suspect, as tables name it: a reading by its symbol, a sweep by what was swept. */
export function measuredText(key: string): { readonly what: string; readonly at: Condition } {
	const { of, conditionKey } = readMeasuredKey(key);
	const at = readConditionKey(conditionKey);
	switch (of) {
		case 'C_tot':
			return { what: 'C–V sweep', at };
		case CURRENT_SWEEP:
			return { what: 'I–V sweep', at };
		default:
			return { what: of, at };
	}
}

/** `C–V sweep, 25 °C`, `I_R, V_R = 60 V, 25 °C`. */
export function placeText(key: string): string {
	const { what, at } = measuredText(key);
	return `${what}, ${what.endsWith('sweep') ? withUnit(at.temperatureCelsius, '°C') : describeCondition(at)}`;
}
