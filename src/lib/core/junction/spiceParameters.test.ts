import { expect, it } from 'vitest';
import {
	growthAt,
	SPICE_DEFAULTS,
	spiceCapacitance,
	spicePotential,
	spiceZeroBiasCapacitance
} from './spiceParameters';

const DIODE = {
	...SPICE_DEFAULTS,
	zeroBiasCapacitance: 1e-11,
	junctionPotential: 0.75,
	gradingExponent: 0.5
};

// ngspice 39: junction capacitance of this model at −40 °C, 0 V and −8 V against 27 °C nominal
it('has the model’s own temperature behaviour', () => {
	const at = { temperature: 233.15, nominal: 300.15 };
	expect(spiceCapacitance(DIODE, 0, at) / 9.111468e-12).toBeCloseTo(1, 4);
	expect(spicePotential(DIODE, 233.15, 300.15)).toBeCloseTo(0.863179818, 6);
	expect(spiceZeroBiasCapacitance(DIODE, 300.15, 300.15)).toBe(1e-11);
	expect(growthAt(DIODE, 300.15)).toBeCloseTo(1, 7);
});

it('goes on by its tangent above FC·VJ, without a step', () => {
	const at = { temperature: 300.15, nominal: 300.15 };
	const [below, above] = [-0.375 + 1e-9, -0.375 - 1e-9].map((bias) =>
		spiceCapacitance(DIODE, bias, at)
	);
	expect(above! / below!).toBeCloseTo(1, 7);
	expect(spiceCapacitance(DIODE, -0.6, at)).toBeLessThan(1e-11 / Math.sqrt(1 - 0.6 / 0.75));
});
