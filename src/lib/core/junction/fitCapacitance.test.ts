import fc from 'fast-check';
import { expect, it } from 'vitest';
import { RESULT_WIDTH } from './capacitanceFitResult';
import { modelCapacitance } from './capacitanceModel';
import { JunctionDataError } from './errors';
import { fitCapacitance, fitSweeps } from './fitCapacitance';

const BIASES = [0, 0.5, 1, 2, 3, 4, 6, 8, 11, 15, 20, 28];
const READINGS = [15.13, 11.95, 10.28, 8.2, 7.05, 6.27, 5.3, 4.69, 4.08, 3.57, 3.14, 2.72].map(
	(value) => value * 1e-12
);

// SciPy 1.17.1: optimize.least_squares of relative errors, tolerances 1e-15; errors from J'J
it('finds the least squares of SciPy, with its standard errors', () => {
	const fit = fitCapacitance(BIASES, READINGS);
	expect(fit.model.zeroBiasCapacitance * 1e12).toBeCloseTo(14.54295872, 4);
	expect(fit.model.junctionPotential).toBeCloseTo(0.9038911, 5);
	expect(fit.model.gradingExponent).toBeCloseTo(0.55385016, 5);
	expect(fit.model.caseCapacitance * 1e12).toBeCloseTo(0.588853, 4);
	expect(fit.residualRms).toBeCloseTo(0.0024415798051761885, 9);
	expect((fit.standardErrors.zeroBiasCapacitance ?? 0) * 1e12).toBeCloseTo(0.09534707, 5);
	expect(fit.standardErrors.junctionPotential).toBeCloseTo(0.02904326, 5);
	expect(fit.standardErrors.gradingExponent).toBeCloseTo(0.01208086, 5);
	expect((fit.standardErrors.caseCapacitance ?? 0) * 1e12).toBeCloseTo(0.07213882, 5);
	expect(fit).toMatchObject({ boundsHit: [], converged: true, identifiable: true });
});

it('holds a fixed exponent like SciPy', () => {
	const fit = fitCapacitance(BIASES, READINGS, { gradingExponent: 0.5 });
	expect(fit.model.gradingExponent).toBe(0.5);
	expect(fit.model.junctionPotential).toBeCloseTo(0.78355099, 5);
	expect(fit.model.caseCapacitance * 1e12).toBeCloseTo(0.23434888, 4);
	expect(fit.residualRms).toBeCloseTo(0.004713931914439323, 9);
	expect(fit.standardErrors.gradingExponent).toBeNull();
	expect(fit.standardErrors.junctionPotential).toBeCloseTo(0.01412307, 5);
});

it('comes back to the law that made the readings', () => {
	const law = fc.record({
		zeroBiasCapacitance: fc.double({ min: 1e-13, max: 1e-9, noNaN: true }),
		junctionPotential: fc.double({ min: 0.3, max: 3, noNaN: true }),
		gradingExponent: fc.double({ min: 0.3, max: 2, noNaN: true })
	});
	fc.assert(
		fc.property(law, fc.double({ min: 0.001, max: 0.03, noNaN: true }), (parts, share) => {
			const model = { ...parts, caseCapacitance: share * parts.zeroBiasCapacitance };
			const readings = BIASES.map((bias) => modelCapacitance(model, bias));
			const fit = fitCapacitance(BIASES, readings);
			expect(fit.model.zeroBiasCapacitance / model.zeroBiasCapacitance).toBeCloseTo(1, 5);
			expect(fit.model.junctionPotential / model.junctionPotential).toBeCloseTo(1, 4);
			expect(fit.model.gradingExponent / model.gradingExponent).toBeCloseTo(1, 4);
			expect(fit.residualRms).toBeLessThan(1e-7);
		}),
		{ numRuns: 60 }
	);
});

it('says which bound it met', () => {
	const flat = BIASES.map((bias) =>
		modelCapacitance(
			{
				zeroBiasCapacitance: 1e-11,
				junctionPotential: 0.7,
				gradingExponent: 3.5,
				caseCapacitance: 0
			},
			bias
		)
	);
	expect(fitCapacitance(BIASES, flat).boundsHit).toContain('gradingExponent');
});

it('says when readings do not tell the parameters apart', () => {
	const narrow = [0, 1e-7, 2e-7, 3e-7, 4e-7];
	const fit = fitCapacitance(narrow, [1e-11, 1e-11, 1e-11, 1e-11, 1e-11]);
	expect(fit.identifiable).toBe(false);
	expect(fit.standardErrors.junctionPotential).toBeNull();
});

it('keeps the junction potential above a forward bias', () => {
	const model = {
		zeroBiasCapacitance: 1e-11,
		junctionPotential: 0.7,
		gradingExponent: 0.45,
		caseCapacitance: 1e-13
	};
	const biases = [-0.4, -0.2, ...BIASES];
	const readings = biases.map((bias) => modelCapacitance(model, bias));
	expect(fitCapacitance(biases, readings).model.junctionPotential).toBeCloseTo(0.7, 5);
});

it('refuses too few readings, unequal lengths and a capacitance of zero', () => {
	expect(() => fitCapacitance([0, 1, 2], [3e-12, 2e-12, 1e-12])).toThrow(
		'capacitance fit requires at least 4 readings, got 3'
	);
	expect(() => fitCapacitance([0, 1], [1e-12])).toThrow(JunctionDataError);
	expect(() =>
		fitCapacitance(
			BIASES,
			BIASES.map(() => 0)
		)
	).toThrow('positive capacitances');
});

it('fits packed sweeps whatever their order, and leaves out absent readings', () => {
	const sweep = (scale: number) => READINGS.map((value, i) => value * scale * (1 + i * 1e-4));
	const rows = [sweep(1), sweep(1.02), sweep(0.97)];
	const packed = (order: readonly number[]) =>
		Float64Array.from(order.flatMap((i) => rows[i] ?? []));
	const forward = fitSweeps(BIASES, packed([0, 1, 2]));
	const backward = fitSweeps(BIASES, packed([2, 1, 0]));
	for (let i = 0; i < 4; i++)
		expect(forward[i]! / backward[2 * RESULT_WIDTH + i]!).toBeCloseTo(1, 10);
	const gaps = packed([0, 1]);
	gaps[3] = NaN;
	gaps.fill(NaN, BIASES.length, 2 * BIASES.length - 3);
	const result = fitSweeps(BIASES, gaps);
	expect(result[2]).toBeCloseTo(0.55, 1);
	expect(result[RESULT_WIDTH]).toBeNaN();
	expect(fitSweeps(BIASES, new Float64Array(0))).toHaveLength(0);
	expect(() => fitSweeps(BIASES, new Float64Array(5))).toThrow('rows of 12 readings, got 5');
});
