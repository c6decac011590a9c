import { expect, it } from 'vitest';
import { modelCapacitance, modelCharge, modelEnergy } from './capacitanceModel';

const model = (junctionPotential: number, gradingExponent: number, caseCapacitance: number) => ({
	zeroBiasCapacitance: 15e-12,
	junctionPotential,
	gradingExponent,
	caseCapacitance
});

it('adds the case to the power law, and ends at the junction potential', () => {
	// 15 / √(1 + 2.1/0.7) + 0.2
	expect(modelCapacitance(model(0.7, 0.5, 0.2e-12), 2.1)).toBeCloseTo(7.7e-12, 24);
	expect(modelCapacitance(model(0.7, 0.5, 0), -0.7)).toBeNaN();
});

// mpmath 1.3.0: quad of C and of v·C from 0 to 10 V
it.each([
	[0.7, 0.5, 0.2e-12, 6.310359310042405e-11, 2.551636335545489e-10],
	[2, 1, 0.2e-12, 5.575278407684165e-11, 2.024944318463167e-10],
	[2, 2, 0, 2.5e-11, 5.75055681536833e-11]
])('stores the charge and energy of mpmath for V_j %f, M %f', (vj, m, cCase, charge, energy) => {
	expect(modelCharge(model(vj, m, cCase), 10) / charge).toBeCloseTo(1, 11);
	expect(modelEnergy(model(vj, m, cCase), 10) / energy).toBeCloseTo(1, 11);
});
