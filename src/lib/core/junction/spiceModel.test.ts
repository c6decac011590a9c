import { expect, it } from 'vitest';
import { JunctionDataError } from './errors';
import { spiceModel } from './spiceModel';

const ABRUPT = {
	zeroBiasCapacitance: 15e-12,
	junctionPotential: 0.75,
	gradingExponent: 0.48,
	caseCapacitance: 0.2e-12
};

it('writes an ordinary junction as a diode with the case in parallel', () => {
	expect(
		spiceModel({
			name: 'LKT1130',
			capacitance: ABRUPT,
			nominalCelsius: 25,
			diode: { seriesResistance: 0.6, breakdownVoltage: 32 },
			notes: ['three lots,\nfitted to the median']
		})
	).toBe(
		[
			'* three lots, fitted to the median',
			'* junction capacitance of the diode model, fitted at 25 degC',
			'.subckt LKT1130 a k',
			'd1 a k LKT1130_d',
			'.model LKT1130_d d(is=1e-14 n=1 rs=0.6 cjo=1.5e-11 vj=0.75 m=0.48 fc=0.5 tt=0 eg=1.11 xti=3 bv=32 ibv=0.001 tnom=25)',
			'ccase a k 2e-13',
			'.ends LKT1130',
			''
		].join('\n')
	);
});

it('writes out the charge of what a simulator would cut off', () => {
	const hyperabrupt = { ...ABRUPT, gradingExponent: 1.6, caseCapacitance: 0 };
	const text = spiceModel({ name: 'H', capacitance: hyperabrupt, nominalCelsius: 25 });
	expect(text).toContain('cjo=0 ');
	expect(text).toContain("cj a k q='1.5e-11*v(g)*v(p)*(");
	expect(text).not.toContain('ccase');
	const wide = { ...ABRUPT, junctionPotential: 3 };
	expect(spiceModel({ name: 'W', capacitance: wide, nominalCelsius: 25 })).toContain('cj a k q=');
});

it('refuses a name that a simulator would not read', () => {
	const input = { capacitance: ABRUPT, nominalCelsius: 25 };
	expect(() => spiceModel({ ...input, name: 'LKT-1130' })).toThrow(JunctionDataError);
	expect(() => spiceModel({ ...input, name: '' })).toThrow('letters, digits and _');
});
