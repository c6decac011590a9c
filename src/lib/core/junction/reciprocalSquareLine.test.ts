import { expect, it } from 'vitest';
import { JunctionDataError } from './errors';
import { reciprocalSquareLine } from './reciprocalSquareLine';

/** A uniformly doped junction by its formula: N = 5e21 m⁻³, V_i = 0.53 V, 0.1 mm², silicon. */
const SETTINGS = {
	area: 1e-7,
	relativePermittivity: 11.7,
	temperature: 300,
	junction: 'metal-semiconductor',
	effectiveDensityOfStates: 2.8e25
} as const;
const SLOPE = 2 / (1.602176634e-19 * 11.7 * 8.8541878188e-12 * 5e21 * 1e-14);
const BIASES = [0, 1, 2, 4, 8, 16];
const readings = (bend = 0) =>
	BIASES.map((bias) => 1 / Math.sqrt(SLOPE * (0.53 + bias + bend * bias * bias)));

it('finds doping, potentials and barrier of a uniform junction', () => {
	const line = reciprocalSquareLine(BIASES, readings(), SETTINGS);
	expect(line.doping / 5e21).toBeCloseTo(1, 11);
	expect(line.voltageIntercept).toBeCloseTo(0.53, 11);
	// kT/q at 300 K = 0.0258519998 V; V_n = kT/q ln(2.8e25/5e21) = 0.22310 V
	expect(line.builtInPotential).toBeCloseTo(0.53 + 0.0258519998, 9);
	expect(line.barrierHeight).toBeCloseTo(0.53 + 0.0258519998 + 0.0258519998 * Math.log(5600), 8);
	expect(line.r2).toBeCloseTo(1, 12);
	expect(line.isCurved).toBe(false);
});

it('corrects twice for a p–n junction, which has no barrier', () => {
	const line = reciprocalSquareLine(BIASES, readings(), { ...SETTINGS, junction: 'p-n' });
	expect(line.builtInPotential).toBeCloseTo(0.53 + 2 * 0.0258519998, 9);
	expect(line.barrierHeight).toBeNull();
});

it('takes the case off and keeps to the window', () => {
	const withCase = readings().map((value) => value + 2e-13);
	const settings = { ...SETTINGS, caseCapacitance: 2e-13, window: [1, 8] as const };
	const line = reciprocalSquareLine(BIASES, withCase, settings);
	expect(line.points).toBe(4);
	expect(line.doping / 5e21).toBeCloseTo(1, 9);
});

it('warns of a bend', () => {
	const line = reciprocalSquareLine(BIASES, readings(0.05), SETTINGS);
	expect(line.isCurved).toBe(true);
	expect(Math.abs(line.curvature)).toBeGreaterThan(0.02);
});

it('refuses a short window, a falling line and a case that uses a reading up', () => {
	const settings = { ...SETTINGS, window: [1, 2] as const };
	expect(() => reciprocalSquareLine(BIASES, readings(), settings)).toThrow(JunctionDataError);
	expect(() => reciprocalSquareLine(BIASES, readings().reverse(), SETTINGS)).toThrow(
		'a rising line'
	);
	const heavy = { ...SETTINGS, caseCapacitance: 1e-9 };
	expect(() => reciprocalSquareLine(BIASES, readings(), heavy)).toThrow('readings above the case');
});
