import { expect, it } from 'vitest';
import { effectiveDensityOfStates } from './bandStates';
import { MATERIAL_PRESETS } from './material';
import { reciprocalSquareLine } from './reciprocalSquareLine';

const silicon = MATERIAL_PRESETS.si;

// By hand: (400/300)^1.5 = 1.5396007
it('is that of the band the carriers are in, and grows with temperature', () => {
	expect(effectiveDensityOfStates({ conductivity: 'n', material: silicon }, 300)).toBe(2.8e25);
	expect(effectiveDensityOfStates({ conductivity: 'p', material: silicon }, 300)).toBe(1.04e25);
	expect(
		effectiveDensityOfStates({ conductivity: 'n', material: silicon }, 400) / 2.8e25
	).toBeCloseTo(1.5396007, 7);
});

// By hand, kT/q = 0.0258519998 V at 300 K: the two barriers differ by kT/q ln(N_C/N_V) = 0.02560 V
it('makes the barrier on p-type lower by what the bands differ in states', () => {
	const biases = [0, 1, 2, 4, 8];
	const capacitances = biases.map((bias) => 1e-12 / Math.sqrt(0.5 + bias));
	const barrierOn = (conductivity: 'n' | 'p') =>
		reciprocalSquareLine(biases, capacitances, {
			area: 1e-8,
			relativePermittivity: silicon.relativePermittivity,
			temperature: 300,
			junction: 'metal-semiconductor',
			effectiveDensityOfStates: effectiveDensityOfStates({ conductivity, material: silicon }, 300)
		}).barrierHeight ?? NaN;
	expect(barrierOn('n') - barrierOn('p')).toBeCloseTo(0.0258519998 * Math.log(2.8 / 1.04), 9);
});
