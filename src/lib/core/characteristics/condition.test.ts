import { describe, expect, it } from 'vitest';
import { conditionKey } from './condition';

describe('conditionKey', () => {
	it('keys a bias as it always did', () => {
		expect(conditionKey({ temperatureCelsius: 25, frequency: 1e6, reverseVoltage: 4 })).toBe(
			'T=25;f=1000000;VR=4'
		);
	});

	it('orders the parts, whatever order they are given in', () => {
		expect(
			conditionKey({
				currentSlope: 1e8,
				pulseDuration: 0.0003,
				forwardCurrent: 2,
				temperatureCelsius: -40
			})
		).toBe('T=-40;IF=2;tp=0.0003;diF=100000000');
		expect(conditionKey({ reverseCurrent: 1e-5, temperatureCelsius: 25 })).toBe('T=25;IR=0.00001');
	});
});
