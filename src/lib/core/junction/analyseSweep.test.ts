import fc from 'fast-check';
import { expect, it } from 'vitest';
import { junctionMessages as say } from '../messages/junction';
import { analyseSweep } from './analyseSweep';
import { modelCapacitance } from './capacitanceModel';
import type { SweepAnalysis } from './sweepAnalysis';
import { sweepRequest } from './sweepRequest';

const BIASES = [0, 0.5, 1, 2, 3, 4, 6, 8, 11, 15, 20, 28];
const READINGS = [15.13, 11.95, 10.28, 8.2, 7.05, 6.27, 5.3, 4.69, 4.08, 3.57, 3.14, 2.72].map(
	(value) => value * 1e-12
);
const SWEEP = { biases: BIASES, capacitances: READINGS };
const SILICON = {
	area: 2e-8,
	relativePermittivity: 11.9,
	temperature: 300,
	junction: 'metal-semiconductor',
	effectiveDensityOfStates: 2.8e25
} as const;

function analysed(request: Readonly<Record<string, unknown>>): SweepAnalysis {
	const outcome = analyseSweep(sweepRequest.parse(request));
	if (outcome.status === 'refused') throw new Error(JSON.stringify(outcome.problems));
	return outcome.analysis;
}

function problemsOf(request: Readonly<Record<string, unknown>>) {
	const outcome = analyseSweep(sweepRequest.parse(request));
	return outcome.status === 'refused' ? outcome.problems : [];
}

/** The sweep of the worked case of the power Schottky: 5 pF + 500 pF (1 + V/1.25)^−½ to 400 V. */
const POWER = {
	zeroBiasCapacitance: 500e-12,
	junctionPotential: 1.25,
	gradingExponent: 0.5,
	caseCapacitance: 5e-12
};
const POWER_BIASES = Array.from({ length: 33 }, (_, i) => i * 12.5);
const POWER_READINGS = POWER_BIASES.map((bias) => modelCapacitance(POWER, bias));

// SciPy 1.17.1: integrate.quad(f, 0, 400, epsrel=1e-13), f and v·f; issue: 23.15 nC and 3.37 µJ
it('stores 23.15 nC and 3.37 µJ at 400 V in the power Schottky, on 33 equal steps', () => {
	const { charge, model, warnings } = analysed({
		biases: POWER_BIASES,
		capacitances: POWER_READINGS
	});
	const last = charge.at(-1)!;
	expect(last.bias).toBe(400);
	expect(last.charge / 2.314559108396115e-8).toBeCloseTo(1, 7);
	expect(last.energy / 3.368457485291519e-6).toBeCloseTo(1, 7);
	expect(last.chargeError).toBeLessThan(1e-7 * last.charge);
	expect(model.caseCapacitance / 5e-12).toBeCloseTo(1, 5);
	expect(warnings).toEqual([say.missingForLine(['area', 'relativePermittivity'])]);
});

// NumPy 2.4.6: polyfit of 1/(C − C_case)², C_case by SciPy 1.17.1 optimize.least_squares
it('reads line, barrier and profile after the case is taken off', () => {
	const { line, profile, warnings } = analysed({ ...SWEEP, ...SILICON, window: [1, 8] });
	expect(line?.slope).toBeCloseTo(6.985582256336734e21, -16);
	expect(line?.intercept).toBeCloseTo(3.283983276085101e21, -16);
	expect((line?.donorConcentration ?? 0) / 4.239955593708765e22).toBeCloseTo(1, 5);
	expect(line?.voltageIntercept).toBeCloseTo(0.4701087404856119, 5);
	expect(line?.builtInPotential).toBeCloseTo(0.49596074027204745, 5);
	expect(line?.barrierHeight).toBeCloseTo(0.6638131706482486, 5);
	expect(line?.r2).toBeCloseTo(0.9997671854807219, 7);
	expect(line).toMatchObject({ window: [1, 8], points: 6 });
	expect(profile).toHaveLength(11);
	expect(profile![0]!.depth / 1.6644147308070953e-7).toBeCloseTo(1, 5);
	expect(profile![0]!.concentration / 4.906934540941396e22).toBeCloseTo(1, 5);
	expect(profile![10]!.concentration / 3.561588387484881e22).toBeCloseTo(1, 4);
	expect(warnings).toEqual([]);
});

it('uses all reverse biases without a window and says that the line bends', () => {
	const { line, warnings } = analysed({ ...SWEEP, ...SILICON });
	expect(line?.window).toEqual([0, 28]);
	expect((line?.donorConcentration ?? 0) / 3.873200563640635e22).toBeCloseTo(1, 5);
	expect(warnings).toEqual([say.lineBends(line?.curvature ?? 0, 0, 28)]);
});

it('says which fact keeps a barrier, a line or a profile away', () => {
	const { effectiveDensityOfStates: states, ...rest } = SILICON;
	const window = [1, 8] as const;
	const without = analysed({ ...SWEEP, ...rest, window });
	expect(without.line?.barrierHeight).toBeNull();
	expect(without.warnings).toEqual([say.noBarrierWithoutStates()]);

	const pn = analysed({ ...SWEEP, ...SILICON, junction: 'p-n', window });
	expect(pn.line?.barrierHeight).toBeNull();
	expect(pn.line?.builtInPotential).toBeCloseTo(0.4701087 + 2 * 0.0258519998, 5);
	expect(pn.warnings).toEqual([say.noBarrierOfPn()]);

	const bare = analysed({ ...SWEEP, area: 2e-8 });
	expect(bare).toMatchObject({ line: null, profile: null });
	expect(bare.warnings).toEqual([say.missingForLine(['relativePermittivity'])]);

	const silent = analysed({
		...SWEEP,
		area: 2e-8,
		relativePermittivity: 11.9,
		effectiveDensityOfStates: states,
		window
	});
	expect(silent.warnings).toEqual([say.temperatureTaken(298.15), say.junctionTaken()]);
});

it('holds what is fixed, and reports bounds and readings that say too little', () => {
	const fixed = analysed({ ...SWEEP, fixed: { gradingExponent: 0.5, caseCapacitance: 0 } });
	expect(fixed.model).toMatchObject({ gradingExponent: 0.5, caseCapacitance: 0 });
	expect(fixed.model.standardErrors).toMatchObject({
		gradingExponent: null,
		caseCapacitance: null
	});

	const few = analysed({ biases: BIASES.slice(0, 4), capacitances: READINGS.slice(0, 4) });
	expect(few.warnings).toContain(say.noSpareReadings(4));

	const steep = { ...POWER, gradingExponent: 3.2, caseCapacitance: 0, junctionPotential: 6 };
	const steepest = analysed({
		biases: BIASES,
		capacitances: BIASES.map((bias) => modelCapacitance(steep, bias))
	});
	expect(steepest.model.boundsHit).toContain('gradingExponent');
	expect(steepest.warnings).toContain(say.boundHit('gradingExponent', 2.5));
});

it('says that a punched-through layer is not one power law', () => {
	const biases = Array.from({ length: 25 }, (_, i) => i);
	const capacitances = biases.map((bias) => 20e-12 / Math.sqrt(1 + Math.min(bias, 6) / 0.7));
	const { model, warnings } = analysed({ biases, capacitances });
	expect(model.residualRms).toBeGreaterThan(0.01);
	expect(warnings.some((text) => text.includes('don’t follow one power law'))).toBe(true);
});

it('says when readings over too little bias do not tell V_j from M', () => {
	const biases = Array.from({ length: 12 }, (_, i) => i * 0.02);
	const noisy = (share: number) =>
		biases.map((bias, i) => modelCapacitance(POWER, bias) * (1 + share * Math.sin(i * i)));
	const { model, warnings } = analysed({ biases, capacitances: noisy(5e-4) });
	expect(model.identifiable).toBe(false);
	expect(warnings).toContain(say.notIdentifiable());
	const held = analysed({
		biases,
		capacitances: noisy(5e-4),
		fixed: { gradingExponent: 0.5, caseCapacitance: 5e-12 }
	});
	expect(held.model.identifiable).toBe(true);
	expect(held.model.junctionPotential).toBeCloseTo(1.25, 1);
});

it('refuses to read one doping from what is not a uniform junction', () => {
	const hyper = { ...POWER, gradingExponent: 1.2, caseCapacitance: 0 };
	const capacitances = BIASES.map((bias) => modelCapacitance(hyper, bias));
	const { line, warnings } = analysed({ ...SILICON, biases: BIASES, capacitances });
	expect(line?.builtInPotential).toBeLessThan(0);
	expect(warnings).toContain(say.noBuiltInPotential(line?.builtInPotential ?? 0));
	expect(warnings).toContain(say.lineBends(line?.curvature ?? 0, 0, 28));

	const rising = [15e-12, 8e-12, 8.1e-12, 8.2e-12, 6e-12, 5e-12];
	const turned = analysed({
		...SILICON,
		biases: [0, 1, 2, 3, 4, 5],
		capacitances: rising,
		window: [1, 3]
	});
	expect(turned.line).toBeNull();
	expect(turned.profile).toHaveLength(3);
	expect(turned.warnings).toEqual(
		expect.arrayContaining([say.lineNotRising(), say.profileGaps(2)])
	);

	const doped = analysed({ ...SWEEP, ...SILICON, area: 2e-10, window: [1, 8] });
	expect(doped.warnings).toContain(say.degenerate());
});

it('gives no charge for a sweep without a reading at 0 V', () => {
	const { charge, warnings } = analysed({
		biases: BIASES.slice(1),
		capacitances: READINGS.slice(1)
	});
	expect(charge).toEqual([]);
	expect(warnings).toContain(say.noChargeWithoutZero());
});

it('exports the law as a model file, the steep ones written out', () => {
	const { spice } = analysed({ ...SWEEP, ...SILICON });
	expect(spice).toContain('.subckt fitted_junction a k');
	expect(spice).toContain('tnom=26.85');
	expect(spice).toMatch(/ccase a k 5\.88\d+e-13/);
	const hyper = { ...POWER, gradingExponent: 1.2, junctionPotential: 2 };
	const exported = analysed({
		biases: BIASES,
		capacitances: BIASES.map((bias) => modelCapacitance(hyper, bias))
	}).spice;
	expect(exported).toContain("cj a k q='");
	expect(exported).toContain('residual below 0.001 percent rms');
	expect(spice).toContain('* 12 readings from 0 V to 28 V reverse bias, residual 0.24 percent rms');
});

it.each([
	[
		{ biases: [0, 1], capacitances: [2e-12] },
		{ path: 'capacitances', message: say.lengthsDiffer(2, 1) }
	],
	[
		{ biases: BIASES, capacitances: READINGS.with(3, 0) },
		{ path: 'capacitances[3]', message: say.notPositive(0) }
	],
	[
		{ biases: [0, 1, 1, 2], capacitances: [4e-12, 3e-12, 3.1e-12, 2e-12] },
		{ path: 'biases', message: say.fewBiases(4, 3) }
	],
	[
		{ biases: BIASES.map((bias) => -bias / 4), capacitances: READINGS },
		{ path: 'biases', message: say.signTurned() }
	],
	[
		{ biases: BIASES.map((bias) => -bias), capacitances: READINGS },
		{ path: 'biases[10]', message: say.forwardBeyond(-20, 20) }
	],
	[
		{ ...SWEEP, fixed: { caseCapacitance: 3e-12 } },
		{ path: 'fixed.caseCapacitance', message: say.caseTooLarge(2.72e-12) }
	],
	[
		{
			biases: [-0.5, ...BIASES],
			capacitances: [25e-12, ...READINGS],
			fixed: { junctionPotential: 0.5 }
		},
		{ path: 'fixed.junctionPotential', message: say.potentialBelowForward(0.5) }
	],
	[
		{ ...SWEEP, window: [1, 2.5] },
		{ path: 'window', message: say.windowTooNarrow(1, 2.5, 2) }
	],
	[
		{ ...SWEEP, window: [8, 1] },
		{ path: 'window', message: say.windowCrossed() }
	]
])('refuses with the place: %#', (request, problem) => {
	expect(problemsOf(request)[0]).toEqual(problem);
});

it('refuses numbers of another kind at the door, with their place', () => {
	const read = sweepRequest.safeParse({ ...SWEEP, permitivity: 11.9 });
	expect(read.success).toBe(false);
	const long = Array.from({ length: 2049 }, () => 1e-12);
	const tooLong = sweepRequest.safeParse({ biases: long, capacitances: long });
	expect(tooLong.error?.issues.map(({ path }) => path[0])).toEqual(['biases', 'capacitances']);
	const hot = sweepRequest.safeParse({ ...SWEEP, fixed: { gradingExponent: 3 } });
	expect(hot.error?.issues[0]?.path).toEqual(['fixed', 'gradingExponent']);
});

it('does not mind the order of the readings, nor a sweep both ways', () => {
	const forward = analysed({ ...SWEEP, ...SILICON });
	const order = fc.shuffledSubarray([...BIASES.keys()], { minLength: BIASES.length });
	fc.assert(
		fc.property(order, (places) => {
			const shuffled = analysed({
				...SILICON,
				biases: places.map((i) => BIASES[i]!),
				capacitances: places.map((i) => READINGS[i]!)
			});
			expect(shuffled).toEqual(forward);
		}),
		{ numRuns: 20 }
	);
	const bothWays = analysed({
		...SILICON,
		biases: [...BIASES, ...BIASES.toReversed()],
		capacitances: [...READINGS, ...READINGS.toReversed()]
	});
	expect(bothWays.model.gradingExponent).toBeCloseTo(forward.model.gradingExponent, 8);
	expect(bothWays.charge).toHaveLength(BIASES.length);
});

it('scales with the capacitance: charge with it, doping with its square, depth against it', () => {
	const one = analysed({ ...SWEEP, ...SILICON });
	fc.assert(
		fc.property(fc.double({ min: 0.01, max: 100, noNaN: true }), (scale) => {
			const scaled = analysed({
				...SILICON,
				biases: BIASES,
				capacitances: READINGS.map((value) => value * scale)
			});
			const isScaledBy = (value: number | undefined, of: number | undefined, by: number) =>
				expect((value ?? NaN) / (of ?? NaN) / by).toBeCloseTo(1, 5);
			isScaledBy(scaled.model.zeroBiasCapacitance, one.model.zeroBiasCapacitance, scale);
			isScaledBy(scaled.model.caseCapacitance, one.model.caseCapacitance, scale);
			isScaledBy(scaled.model.gradingExponent, one.model.gradingExponent, 1);
			isScaledBy(scaled.charge.at(-1)?.charge, one.charge.at(-1)?.charge, scale);
			isScaledBy(scaled.charge.at(-1)?.energy, one.charge.at(-1)?.energy, scale);
			isScaledBy(scaled.line?.donorConcentration, one.line?.donorConcentration, scale ** 2);
			isScaledBy(scaled.profile?.[0]?.depth, one.profile?.[0]?.depth, 1 / scale);
			isScaledBy(scaled.line?.builtInPotential, one.line?.builtInPotential, 1);
		}),
		{ numRuns: 20 }
	);
});
