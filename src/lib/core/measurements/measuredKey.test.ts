import { expect, it } from 'vitest';
import { CURRENT_SWEEP, measuredKey, readMeasuredKey } from './measuredKey';

it.each([
	[{ of: 'C_tot', conditionKey: 'T=25;f=1000000' }, 'T=25;f=1000000'],
	[{ of: CURRENT_SWEEP, conditionKey: 'T=25' }, 'I T=25'],
	[{ of: 'R_th(j-mb)', conditionKey: 'T=25' }, 'R_th(j-mb) T=25']
])('%j is keyed %s, and read back', (measured, key) => {
	expect(measuredKey(measured)).toBe(key);
	expect(readMeasuredKey(key)).toEqual(measured);
});
