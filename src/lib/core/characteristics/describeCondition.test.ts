import { expect, it } from 'vitest';
import { describeCondition } from './describeCondition';

it.each([
	[{ temperatureCelsius: 25, reverseVoltage: 60 }, 'V_R = 60 V, 25 °C'],
	[
		{ temperatureCelsius: -40, frequency: 1e8, forwardCurrent: 0.01 },
		'f = 100 MHz, I_F = 10 mA, −40 °C'
	],
	[
		{ temperatureCelsius: 25, frequency: 1e6, reverseVoltage: 1, secondReverseVoltage: 28 },
		'f = 1 MHz, V_R = 1 V, second V_R = 28 V, 25 °C'
	],
	[{ temperatureCelsius: 25, reverseVoltage: 0 }, 'V_R = 0 V, 25 °C'],
	[
		{ temperatureCelsius: 25, reverseCurrent: 1.25e-5, pulseDuration: 3e-4 },
		'I_R = 12.5 µA, t_p = 300 µs, 25 °C'
	],
	[{ temperatureCelsius: 25, currentSlope: 1e8 }, 'di_F/dt = 100 MA/s, 25 °C']
])('%j reads %s', (condition, words) => {
	expect(describeCondition(condition).replaceAll('\u00a0', ' ')).toBe(words);
});
