import { expect, it } from 'vitest';
import { frequencyText, instantText, namesText, sizeText, withUnit } from './words';

it.each([
	[1e6, '1\u00a0MHz'],
	[470e3, '470\u00a0kHz'],
	[1.5e6, '1.5\u00a0MHz'],
	[100, '100\u00a0Hz'],
	[2.4e9, '2.4\u00a0GHz']
])('%d Hz is %s', (hertz, text) => {
	expect(frequencyText(hertz)).toBe(text);
});

it.each([
	[999, '999\u00a0B'],
	[422_091, '422\u00a0kB'],
	[140_690_302, '141\u00a0MB'],
	[1_500_000, '1.5\u00a0MB']
])('%d bytes are %s', (bytes, text) => {
	expect(sizeText(bytes)).toBe(text);
});

it('writes a cold temperature with a minus sign', () => {
	expect(withUnit(-40, '°C')).toBe('\u221240\u00a0°C');
});

it('writes an instant to the minute with its zone', () => {
	expect(instantText('2026-02-14T10:21:33.123Z')).toBe('2026-02-14 10:21 UTC');
});

it('counts the names it leaves out', () => {
	expect(namesText(['A', 'B'])).toBe('A, B');
	expect(namesText(['A', 'B', 'C', 'D', 'E', 'F'])).toBe('A, B, C, D and 2 more');
});
