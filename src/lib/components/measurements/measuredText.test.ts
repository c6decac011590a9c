import { expect, it } from 'vitest';
import { placeText } from './measuredText';

it.each([
	['T=-40;f=1000000', 'C–V sweep, −40 °C'],
	['I T=25', 'I–V sweep, 25 °C'],
	['I_R T=25;VR=60', 'I_R, V_R = 60 V, 25 °C'],
	['R_th(j-mb) T=25', 'R_th(j-mb), 25 °C']
])('%s is spoken of as %s', (key, text) => {
	expect(placeText(key).replaceAll('\u00a0', ' ')).toBe(text);
});
