import { expect, it } from 'vitest';
import { sampleDocument } from '../../../../tests/factories/sampleDocument';
import { capacitanceTableCsv } from './capacitanceTableCsv';

it('writes the digits of the datasheet, one line a bias', () => {
	const lines = capacitanceTableCsv(sampleDocument()).split('\r\n');
	expect(lines).toHaveLength(9);
	expect(lines[0]).toBe(
		'temperature_celsius,frequency_hertz,reverse_voltage_volt,capacitance_minimum,capacitance_typical,capacitance_maximum,capacitance_unit,basis'
	);
	expect(lines[1]).toBe('25,1000000,0.5,27.6,30.4,33.5,pF,characterized');
	expect(lines[7]).toBe('25,1000000,28,1.91,2.05,2.21,pF,tested on every device');
	expect(lines[8]).toBe('');
});
