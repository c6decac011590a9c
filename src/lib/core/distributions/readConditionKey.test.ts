import { expect, it } from 'vitest';
import { conditionKey } from '../characteristics/condition';
import { readConditionKey } from './readConditionKey';

it.each([
	{ temperatureCelsius: 25 },
	{ temperatureCelsius: -40, frequency: 1e6 },
	{ temperatureCelsius: 25, frequency: 1e6, reverseVoltage: 0 },
	{ temperatureCelsius: 125.5, frequency: 100, reverseVoltage: -0.2 },
	{ temperatureCelsius: 25, frequency: 1e21, reverseVoltage: 1e-7 }
])('reads %o back', (condition) => {
	expect(readConditionKey(conditionKey(condition))).toEqual(condition);
});

it.each(['', 'T=', 'T=warm', 'f=1000000', 'T=25;x=3', 'T=25;f=-1'])('refuses "%s"', (key) => {
	expect(() => readConditionKey(key)).toThrow(RangeError);
});
