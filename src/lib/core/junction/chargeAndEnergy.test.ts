import { expect, it } from 'vitest';
import { modelCapacitance } from './capacitanceModel';
import { chargeAndEnergy } from './chargeAndEnergy';
import { JunctionDataError } from './errors';

const MODEL = {
	zeroBiasCapacitance: 15e-12,
	junctionPotential: 0.7,
	gradingExponent: 0.5,
	caseCapacitance: 0.2e-12
};
const BIASES = [0, 0.5, 1, 2, 4, 7, 10];

// mpmath 1.3.0: quad of the law from 0 to 10 V
it('is the integral of the law where readings follow it', () => {
	const readings = BIASES.map((bias) => modelCapacitance(MODEL, bias));
	const last = chargeAndEnergy(BIASES, readings, MODEL).at(-1);
	expect((last?.charge ?? 0) / 6.310359310042405e-11).toBeCloseTo(1, 11);
	expect((last?.energy ?? 0) / 2.551636335545489e-10).toBeCloseTo(1, 11);
});

// A departure of a + b·v integrates to aV + bV²/2, and times v to aV²/2 + bV³/3
it('adds what the readings depart from it', () => {
	const readings = BIASES.map((bias) => modelCapacitance(MODEL, bias) + 1e-14 + 2e-15 * bias);
	const exact = chargeAndEnergy(
		BIASES,
		BIASES.map((bias) => modelCapacitance(MODEL, bias)),
		MODEL
	);
	chargeAndEnergy(BIASES, readings, MODEL).forEach(({ bias, charge, energy }, i) => {
		expect(charge - exact[i]!.charge).toBeCloseTo(1e-14 * bias + 1e-15 * bias ** 2, 24);
		expect(energy - exact[i]!.energy).toBeCloseTo(5e-15 * bias ** 2 + (2e-15 / 3) * bias ** 3, 23);
	});
});

it('starts at zero bias or not at all', () => {
	expect(chargeAndEnergy([-0.5, 0, 1], [2e-11, 1e-11, 9e-12], MODEL)).toHaveLength(2);
	expect(() => chargeAndEnergy([1, 2], [9e-12, 8e-12], MODEL)).toThrow(JunctionDataError);
});

// SciPy 1.17.1: integrate.quad of 20 pF (1 + v)^−½ + 1 pF exp(−((v − 6)/3)²) and of v times it
it('shows an error that covers what the quadrature misses', () => {
	const law = { ...MODEL, zeroBiasCapacitance: 20e-12, junctionPotential: 1, caseCapacitance: 0 };
	const biases = Array.from({ length: 11 }, (_, i) => 2 * i);
	const readings = biases.map(
		(bias) => modelCapacitance(law, bias) + 1e-12 * Math.exp(-(((bias - 6) / 3) ** 2))
	);
	const stored = chargeAndEnergy(biases, readings, law);
	for (const [bias, charge, energy] of [
		[8, 8.438561006876911e-11, 2.901774357063458e-10],
		[20, 1.4860795274676956e-10, 1.1583968035207159e-9]
	] as const) {
		const found = stored[bias / 2]!;
		const [missedCharge, missedEnergy] = [found.charge - charge, found.energy - energy].map(
			Math.abs
		);
		expect(missedCharge).toBeGreaterThan(0);
		expect(missedCharge).toBeLessThan(found.chargeError ?? 0);
		expect(missedEnergy).toBeLessThan(found.energyError ?? 0);
		expect(found.chargeError).toBeLessThan(0.02 * charge);
	}
});

it('has no error to show from two readings, and nothing from none', () => {
	const two = chargeAndEnergy([0, 1], [15e-12, 10e-12], MODEL);
	expect(two[1]).toMatchObject({ chargeError: null, energyError: null });
	expect(chargeAndEnergy([-1], [2e-11], MODEL)).toEqual([]);
});
