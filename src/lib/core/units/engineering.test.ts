import { expect, it } from 'vitest';
import { engineering, inEngineeringUnits } from './engineering';

it.each([
	[1.25e-11, 'F', 3, '12.5', 'pF'],
	[9.996e-10, 'F', 3, '1.00', 'nF'],
	[3e-10, 'F', 4, '300.0', 'pF'],
	[1e6, 'Hz', 1, '1', 'MHz'],
	[0.05, 'V', 2, '50', 'mV'],
	[-2.5e-9, 'A', 2, '\u22122.5', 'nA'],
	[0, 'F', 3, '0', 'F'],
	[5e-20, 'F', 2, '0.050', 'aF']
] as const)('%d %s at %d figures is %s %s', (value, base, figures, text, unit) => {
	expect(engineering(value, base, figures)).toEqual({ text, unit });
});

it('joins number and unit by a space that does not break', () => {
	expect(inEngineeringUnits(1.384e-11, 'F', 4)).toBe('13.84\u00a0pF');
});
