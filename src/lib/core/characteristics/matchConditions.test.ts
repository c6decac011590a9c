import { describe, expect, it } from 'vitest';
import type { Condition } from './condition';
import { matchConditions } from './matchConditions';

const at = (condition: Condition) => ({ condition });
const dc = at({ temperatureCelsius: 25, forwardCurrent: 1 });
const pulsed = at({ temperatureCelsius: 25, forwardCurrent: 1, pulseDuration: 3e-4 });
const cold = at({ temperatureCelsius: -40, forwardCurrent: 1 });

describe('the conditions a stated one speaks of', () => {
	it('are the very same one alone', () => {
		expect(matchConditions([dc, pulsed, cold], dc.condition)).toEqual([dc]);
	});

	it('are those that say more, where none is the same', () => {
		expect(matchConditions([pulsed, cold], dc.condition)).toEqual([pulsed]);
		expect(matchConditions([dc, pulsed, cold], { temperatureCelsius: 25 })).toEqual([dc, pulsed]);
	});

	it('are none where one states what they don’t', () => {
		expect(matchConditions([dc], pulsed.condition)).toEqual([]);
	});
});
