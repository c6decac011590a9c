import { describe, expect, it } from 'vitest';
import { CHARACTERISTICS, findCharacteristic, keyOf } from './catalogue';

describe('the catalogue of characteristics', () => {
	it('keys each entry by the plain text of its symbol, once', () => {
		const keys = CHARACTERISTICS.map(({ key }) => key);
		expect(keys).toEqual(CHARACTERISTICS.map(keyOf));
		expect(new Set(keys).size).toBe(keys.length);
	});

	it('knows the total capacitance, summed up in logarithms', () => {
		expect(findCharacteristic('C_tot')).toMatchObject({
			symbol: { quantity: 'C', subscript: 'tot' },
			unit: 'F',
			transform: 'ln',
			fallsWithReverseVoltage: true
		});
	});

	it('does not know what nobody measures', () => {
		expect(findCharacteristic('C_j')).toBeUndefined();
	});
});
