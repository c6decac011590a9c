import { expect, it } from 'vitest';
import { JunctionDataError } from './errors';
import { barrierFromSaturation, cheung, fitForward, semilogarithmicLine } from './fitForward';
import { forwardCurrent } from './forwardCurrent';

const DIODE = { ideality: 1.05, saturationCurrent: 3.6648148443e-10, seriesResistance: 5 };
const SETTINGS = { area: 1e-7, richardson: 112e4, temperature: 300 };
const VOLTAGES = Array.from({ length: 81 }, (_, i) => 0.05 + i * 0.01);
const CURRENTS = VOLTAGES.map((voltage) => forwardCurrent(DIODE, voltage, 300));

it('finds the diode that made the sweep', () => {
	const { model, residualRms, converged } = fitForward(VOLTAGES, CURRENTS, 300);
	expect(model.ideality).toBeCloseTo(1.05, 9);
	expect(model.saturationCurrent / DIODE.saturationCurrent).toBeCloseTo(1, 8);
	expect(model.seriesResistance).toBeCloseTo(5, 8);
	expect(residualRms).toBeLessThan(1e-10);
	expect(converged).toBe(true);
});

it('reads the straight part of ln I, by two points or more', () => {
	const straight = VOLTAGES.map((v) => 1e-12 * Math.exp(v / (1.2 * 0.0258519998)));
	const line = semilogarithmicLine(VOLTAGES, straight, 300);
	expect(line.ideality).toBeCloseTo(1.2, 7);
	expect(line.saturationCurrent / 1e-12).toBeCloseTo(1, 7);
	expect(semilogarithmicLine([0.2, 0.3], [1.36e-6, 3.04e-5], 300).ideality).toBeCloseTo(
		1.245003,
		6
	);
});

// A A* T² exp(−0.8/(kT/q)) is the saturation current above
it('has barrier and series resistance twice by Cheung’s functions', () => {
	expect(barrierFromSaturation(DIODE.saturationCurrent, SETTINGS)).toBeCloseTo(0.8, 6);
	const high = VOLTAGES.flatMap((v, i) => (CURRENTS[i]! > 1e-4 ? [i] : []));
	const result = cheung(
		high.map((i) => VOLTAGES[i]!),
		high.map((i) => CURRENTS[i]!),
		SETTINGS
	);
	expect(result.seriesResistance).toBeCloseTo(5, 1);
	expect(result.seriesResistanceAgain).toBeCloseTo(5, 1);
	expect(result.barrierHeight).toBeCloseTo(0.8, 2);
});

it('refuses a current of zero, too few points, and a sweep that falls', () => {
	expect(() => fitForward([0.1, 0.2, 0.3], [1, 2, 3], 300)).toThrow(JunctionDataError);
	expect(() => fitForward([0.1, 0.2, 0.3, 0.4], [0, 1, 2, 3], 300)).toThrow('positive currents');
	expect(() => semilogarithmicLine([0.2, 0.3], [2e-6, 1e-6], 300)).toThrow('a rising line');
	expect(() => cheung([0.1, 0.2], [1e-6, 1e-5], SETTINGS)).toThrow('at least 3 points, got 2');
});
