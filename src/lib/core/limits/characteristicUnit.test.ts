import { expect, it } from 'vitest';
import { characteristicUnit } from './characteristicUnit';

it.each([
	['A', [2e-10, 8e-10], 'pA', 1e-12],
	['A', [2e-9, 5e-6], 'nA', 1e-9],
	['V', [668.4], 'V', 1],
	['C', [23.15e-9], 'nC', 1e-9],
	['J', [3.37e-6], 'µJ', 1e-6],
	['s', [], 's', 1],
	['', [7.5], '', 1],
	['1/K', [2e-4], '10⁻⁶/K', 1e-6],
	['F', [12e-12], 'pF', 1e-12],
	['Ω', [0.48], 'mΩ', 1e-3]
])('%s around %j is shown in %s', (unit, typicals, symbol, unitScale) => {
	expect(characteristicUnit({ unit }, typicals)).toEqual({ unit: symbol, unitScale });
});
