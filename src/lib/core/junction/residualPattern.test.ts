import { expect, it } from 'vitest';
import { modelCapacitance } from './capacitanceModel';
import { residualPattern } from './residualPattern';

const MODEL = {
	zeroBiasCapacitance: 1e-11,
	junctionPotential: 0.7,
	gradingExponent: 0.5,
	caseCapacitance: 0
};
const BIASES = Array.from({ length: 12 }, (_, i) => i);
/** Readings whose relative residual model/reading − 1 is as given. */
const readings = (residual: (i: number) => number) =>
	BIASES.map((bias, i) => modelCapacitance(MODEL, bias) / (1 + residual(i)));

// By hand: ±r alternating has steps of 2r, 11·4r²/12r² = 44/12
it('takes alternating residuals for noise', () => {
	const found = residualPattern(
		BIASES,
		readings((i) => (i % 2 === 0 ? 0.01 : -0.01)),
		MODEL
	);
	expect(found.successiveRatio).toBeCloseTo(44 / 12, 10);
	expect(found.isPattern).toBe(false);
});

// By hand: six of +r, six of −r have one step of 2r, 4r²/12r² = 1/3; the bound is 2 − 2.326·√(40/143)
it('takes a run on either side for a pattern, and finds the largest', () => {
	const residual = (i: number) => (i === 9 ? -0.02 : i < 6 ? 0.01 : -0.01);
	expect(
		residualPattern(
			BIASES,
			readings((i) => (i < 6 ? 0.01 : -0.01)),
			MODEL
		)
	).toMatchObject({
		isPattern: true
	});
	const found = residualPattern(BIASES, readings(residual), MODEL);
	expect(found.at).toBe(9);
	expect(found.largest).toBeCloseTo(0.02, 12);
});

it('judges no pattern from few readings or from none at all', () => {
	const few = residualPattern(
		BIASES.slice(0, 7),
		readings((i) => 0.01 * (i - 3)).slice(0, 7),
		MODEL
	);
	expect(few.isPattern).toBe(false);
	expect(
		residualPattern(
			BIASES,
			readings(() => 0),
			MODEL
		).isPattern
	).toBe(false);
});
