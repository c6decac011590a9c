import { describe, expect, it } from 'vitest';
import { modelCapacitance } from './capacitanceModel';
import { lineSettings, medianJunction } from './medianJunction';

const POWER = {
	zeroBiasCapacitance: 500e-12,
	junctionPotential: 1.25,
	gradingExponent: 0.5,
	caseCapacitance: 5e-12
};
const BIASES = [0, 0.5, 1, 2, 4, 8, 15, 30, 60, 100, 150, 200, 300, 400];
const sweepOf = (biases: number[]) => ({
	biases,
	capacitances: biases.map((bias) => modelCapacitance(POWER, bias))
});

describe('the junction of a median sweep', () => {
	// SciPy 1.17.1: integrate.quad of C and of v·C, epsrel 1e-12, from 0 V to 400 V
	it('holds the charge and energy of the power Schottky at 400 V', () => {
		const { charge } = medianJunction(sweepOf(BIASES)) ?? {};
		expect(charge?.bias).toBe(400);
		expect((charge?.charge ?? 0) * 1e9).toBeCloseTo(23.15, 2);
		expect((charge?.energy ?? 0) * 1e6).toBeCloseTo(3.37, 2);
	});

	it('has no charge where nobody measured at 0 V, and says so', () => {
		const found = medianJunction(sweepOf(BIASES.slice(1)));
		expect(found?.charge).toBeNull();
		expect(found?.warnings.join(' ')).toContain('0 V');
	});

	it.each([
		['three biases', sweepOf([0, 1, 2])],
		['a sweep that rises', { biases: [0, 1, 2, 3], capacitances: [1e-12, 2e-12, 3e-12, 4e-12] }],
		['nothing', { biases: [], capacitances: [] }]
	])('is none for %s', (_, sweep) => {
		expect(medianJunction(sweep)).toBeUndefined();
	});
});

describe('what the line of a die is read with', () => {
	it('takes N_C of n-type and N_V of p-type, at the temperature', () => {
		const material = {
			name: 'Si',
			relativePermittivity: 11.9,
			conductionStates: 2.8e25,
			valenceStates: 1.04e25,
			source: 'for the test'
		};
		const die = { area: 1e-6, material, junction: 'metal-semiconductor' as const };
		const n = lineSettings({ ...die, conductivity: 'n' }, 26.85);
		expect(n).toMatchObject({ area: 1e-6, temperature: 300, effectiveDensityOfStates: 2.8e25 });
		expect(lineSettings({ ...die, conductivity: 'p' }, 26.85).effectiveDensityOfStates).toBe(
			1.04e25
		);
	});
});
