import { expect, it } from 'vitest';
import { capacitanceUnit } from './tableUnit';

it.each<[string, number[], string]>([
	['a tuning diode', [39e-12, 14e-12, 2e-12], 'pF'],
	['a small rectifier that begins above 1000 pF', [1.4e-9, 300e-12, 90e-12], 'pF'],
	['a large rectifier', [9e-9, 3e-9, 0.8e-9], 'nF'],
	['one value of exactly 1 nF', [1e-9], 'nF'],
	['a module', [4e-6, 2e-6], 'µF'],
	['nothing', [], 'pF']
])('%s is tabled in its unit', (_, typicals, unit) => {
	expect(capacitanceUnit(typicals).unit).toBe(unit);
});
