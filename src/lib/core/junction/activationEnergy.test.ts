import { expect, it } from 'vitest';
import { activatedCurrent, activationEnergy } from './activationEnergy';
import { JunctionDataError } from './errors';

// By hand: 0.62 eV carries 2 nA at 25 °C to 114 nA at 85 °C
it('goes there and back', () => {
	const at = (celsius: number) =>
		activatedCurrent(2e-9, { from: 298.15, to: celsius + 273.15, energy: 0.62 });
	expect(at(85)).toBeCloseTo(1.13958655e-7, 14);
	expect(activationEnergy([298.15, 358.15], [at(25), at(85)])).toBeCloseTo(0.62, 11);
	const temperatures = [298.15, 323.15, 358.15];
	const currents = [25, 50, 85].map(at);
	expect(activationEnergy(temperatures, currents)).toBeCloseTo(0.62, 11);
});

it('refuses one temperature, the same twice and a current of zero', () => {
	expect(() => activationEnergy([300], [1e-9])).toThrow(JunctionDataError);
	expect(() => activationEnergy([300, 300], [1e-9, 2e-9])).toThrow('temperatures that differ');
	expect(() => activationEnergy([300, 350], [1e-9, 0])).toThrow('positive currents, got 0');
});
