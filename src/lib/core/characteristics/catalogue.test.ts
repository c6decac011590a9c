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

	it.each([
		['V_F', 'V', 'identity'],
		['I_R', 'A', 'ln'],
		['V_(BR)', 'V', 'identity'],
		['r_s', 'Ω', 'ln'],
		['t_rr', 's', 'ln'],
		['R_th(j-mb)', 'K/W', 'ln']
	])('takes %s as readings in %s, summed up by %s', (key, unit, transform) => {
		expect(findCharacteristic(key)).toMatchObject({ unit, transform, measuredAs: 'reading' });
	});

	it.each([
		['C_ratio', '', 'ln'],
		['Q_C', 'C', 'ln'],
		['E_C', 'J', 'ln'],
		['Q', '', 'ln'],
		['α_C', '1/K', 'identity']
	])('computes %s in %s device by device, summed up by %s', (key, unit, transform) => {
		expect(findCharacteristic(key)).toMatchObject({ unit, transform, measuredAs: 'derived' });
	});

	it('does not know what nobody measures', () => {
		expect(findCharacteristic('C_j')).toBeUndefined();
	});
});
