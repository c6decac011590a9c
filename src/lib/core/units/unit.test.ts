import { describe, expect, it } from 'vitest';
import { findUnit, inSi, inUnit, UNITS } from './unit';

describe('findUnit', () => {
	it.each([
		['capacitance', 'pF', 1e-12],
		['capacitance', 'uF', 1e-6],
		['capacitance', '\u03bcF', 1e-6],
		['capacitance', 'Picofarad', 1e-12],
		['voltage', 'mV', 1e-3],
		['frequency', 'MHz', 1e6],
		['temperature', 'C', 1],
		['temperature', 'ºC', 1],
		['temperature', 'degC', 1]
	] as const)('reads %s in %s', (kind, text, scale) => {
		expect(findUnit(kind, text)?.scale).toBe(scale);
	});

	it.each([
		['capacitance', 'PF'],
		['capacitance', 'V'],
		['voltage', 'MV'],
		['frequency', 'mhz'],
		['frequency', ''],
		['temperature', 'F']
	] as const)('does not take %s in %s for a unit', (kind, text) => {
		expect(findUnit(kind, text)).toBeUndefined();
	});
});

describe('inSi', () => {
	it('turns 298.15 K into 25 °C and 500 mV into 0.5 V without error', () => {
		expect(inSi(298.15, UNITS.temperature[1])).toBe(25);
		expect(inSi(233.15, UNITS.temperature[1])).toBe(-40);
		expect(inSi(500, UNITS.voltage[1])).toBe(0.5);
		expect(inSi(300, UNITS.voltage[1])).toBe(0.3);
		expect(inSi(1, UNITS.frequency[2])).toBe(1e6);
	});
});

describe('inUnit', () => {
	it('shifts the decimal point instead of dividing', () => {
		expect(inUnit(1.25e-11, 1e-12)).toBe(12.5);
		expect(inUnit(3.9417e-11, 1e-12)).toBe(39.417);
		expect(inUnit(2.1e-12, 1e-12)).toBe(2.1);
		expect(inUnit(1.2e6, 1e6)).toBe(1.2);
		expect(inUnit(inSi(38.917, UNITS.capacitance[3]), 1e-12)).toBe(38.917);
	});

	it('refuses a unit that is no power of ten', () => {
		expect(() => inUnit(1, 0.02)).toThrow(RangeError);
	});
});
