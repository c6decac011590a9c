import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { computeDistribution, type DistributionInput } from './computeDistribution';
import { EXTREMES } from './extremes';
import { distributionSummary } from './summary';

/** Values in pF by lot and wafer. */
function inputOf(lots: readonly (readonly (readonly number[])[])[]): DistributionInput {
	const wafers = lots.flatMap((of, lot) => of.map((values, wafer) => ({ values, lot, wafer })));
	return {
		characteristic: 'C_tot',
		conditionKey: 'T=25;VR=4',
		unit: 'F',
		transform: 'ln',
		values: Float64Array.from(wafers.flatMap(({ values }) => [...values])),
		groupOf: Int32Array.from(wafers.flatMap(({ values }, group) => values.map(() => group))),
		groups: wafers.map(({ lot, wafer }) => ({
			lot: `L${lot}`,
			waferLot: `L${lot}`,
			wafer: String(wafer)
		})),
		sets: [1],
		uncertainty: null,
		excluded: 0,
		quarantined: 0
	};
}

const NESTED = [
	[
		[14.71, 14.93, 15.02],
		[14.88, 14.79, 14.96]
	],
	[
		[15.21, 15.4, 15.11],
		[15.33, 15.29, 15.02]
	],
	[
		[14.5, 14.62, 14.99],
		[14.7, 14.81, 14.58]
	]
];

describe('three lots of two wafers', () => {
	const { components, normality } = computeDistribution(inputOf(NESTED))!;

	// R 4.2.2: anova(lm(y ~ factor(lot) + factor(wafer))), by hand from its mean squares
	it('have the mean squares and components R gives, a negative one shown as 0', () => {
		expect(components?.betweenLots.degrees).toBe(2);
		expect(components?.betweenLots.meanSquare).toBeCloseTo(0.00191721284879804, 14);
		expect(components?.betweenWafers?.degrees).toBe(3);
		expect(components?.betweenWafers?.meanSquare).toBeCloseTo(1.82874397379947e-6, 15);
		expect(components?.within.degrees).toBe(12);
		expect(components?.within.meanSquare).toBeCloseTo(0.000120919355155535, 15);
		expect(components?.lot.variance).toBeCloseTo(0.000319230684137374, 15);
		expect(components?.wafer?.estimate).toBeCloseTo(-3.96968703939119e-5, 15);
		expect(components?.wafer).toMatchObject({ variance: 0, isNegative: true });
		expect(components?.coefficients.k1).toBeCloseTo(3, 12);
		expect(components?.coefficients.k3).toBeCloseTo(6, 12);
	});

	// mpmath 1.3.0: (y - mean of its lot) * sqrt(6/5); A* = A²(1 + 0.75/n + 2.25/n²) written out. Each
	// logarithm of a tail is good to 5e-12, so that A* is to 2n · 5e-12 = 2e-10.
	it('have the Anderson–Darling of their residuals within lots', () => {
		expect(normality?.statistic).toBeCloseTo(0.214774849963976, 9);
		expect(normality?.pValue).toBeCloseTo(0.849128944025712, 9);
	});
});

describe('twelve devices of three lots without a second wafer', () => {
	const ONE_WAFER = [
		[[14.71, 14.93, 15.02, 14.88]],
		[[15.21, 15.4, 15.11]],
		[[14.5, 14.62, 14.99, 14.7, 14.81]]
	];
	const { components, normality } = computeDistribution(inputOf(ONE_WAFER))!;

	// R 4.2.2: anova(lm(y ~ factor(lot))); n0 = (12 - 50/12)/2
	it('have one-way components', () => {
		expect(components).toMatchObject({ wafer: null, betweenWafers: null });
		expect(components?.betweenLots.meanSquare).toBeCloseTo(0.00111986653441598, 14);
		expect(components?.within.meanSquare).toBeCloseTo(0.000117704016300444, 15);
		expect(components?.coefficients).toEqual({
			k1: null,
			k2: null,
			k3: expect.closeTo(3.91666666666667, 12) as number
		});
		expect(components?.lot.variance).toBeCloseTo(0.000255871281220988, 15);
	});

	// mpmath 1.3.0: as above, each lot's residuals times √(n/(n − 1)) of its own
	it('have the Anderson–Darling of residuals of unequal lots', () => {
		expect(normality?.statistic).toBeCloseTo(0.135729584014851, 9);
		expect(normality?.pValue).toBeCloseTo(0.978289955973496, 9);
	});
});

it('has components of lots whose wafers gave one device each, without a wafer level', () => {
	const singles = NESTED.map((wafers) => wafers.flat().map((value) => [value]));
	const { components, wafers } = computeDistribution(inputOf(singles))!;
	expect(wafers).toBe(18);
	expect(components?.wafer).toBeNull();
	expect(components?.within.degrees).toBe(15);
});

it('has neither components nor normality where nothing tells', () => {
	const oneLot = computeDistribution(inputOf([[[14.7, 14.9, 15]]]))!;
	expect(oneLot).toMatchObject({ components: null, normality: null });
	const singles = computeDistribution(inputOf(NESTED.map(([[value = 0] = []]) => [[value]])))!;
	expect(singles).toMatchObject({ components: null, normality: null });
	const alike = computeDistribution(inputOf([[[15, 15, 15, 15]], [[15, 15, 15, 15]]]))!;
	expect(alike.normality).toBeNull();
});

it('survives JSON with a device so far off that its tail underflows', () => {
	const lot = Array.from({ length: 5000 }, (_, i) => 15 + 0.001 * Math.sin(i));
	const { groups, extremes, ...summary } = computeDistribution(inputOf([[[...lot, 2]]]))!;
	expect(groups).toHaveLength(1);
	expect(extremes.lowest[0]).toBe(2);
	expect(distributionSummary.parse(JSON.parse(JSON.stringify(summary)))).toEqual(summary);
	expect(summary.normality?.pValue).toBe(3.7e-24);
});

describe('the outermost devices', () => {
	const falling = Array.from({ length: 700 }, (_, i) => 700 - i);

	it('are at most 512 a side, each from outside in', () => {
		const { lowest, highest } = computeDistribution(inputOf([[falling]]))!.extremes;
		expect(lowest).toEqual(Array.from({ length: EXTREMES }, (_, i) => i + 1));
		expect(highest).toEqual(Array.from({ length: EXTREMES }, (_, i) => 700 - i));
	});

	it('are all devices twice in a small sample', () => {
		const { lowest, highest } = computeDistribution(inputOf([[[3, 1, 2]]]))!.extremes;
		expect([lowest, highest]).toEqual([
			[1, 2, 3],
			[3, 2, 1]
		]);
	});
});

const sample = fc.array(
	fc.array(fc.double({ min: 10, max: 20, noNaN: true }), { minLength: 2, maxLength: 6 }),
	{
		minLength: 2,
		maxLength: 5
	}
);

it('does not change when lots come under other names', () => {
	fc.assert(
		fc.property(sample, (lots) => {
			const of = (order: readonly (readonly number[])[]) =>
				computeDistribution(inputOf(order.map((values) => [values])))!;
			const [there, back] = [of(lots), of(lots.toReversed())];
			expect(back.extremes).toEqual(there.extremes);
			expect(back.quantiles).toEqual(there.quantiles);
			expect(back.mean).toBe(there.mean);
			expect(back.standardDeviation).toBeCloseTo(there.standardDeviation, 13);
			expect(back.components?.lot.estimate ?? 0).toBeCloseTo(
				there.components?.lot.estimate ?? 0,
				13
			);
			expect(back.normality?.statistic ?? 0).toBeCloseTo(there.normality?.statistic ?? 0, 8);
		})
	);
});

it('moves with a scale of the values; spread, components and normality stay', () => {
	fc.assert(
		fc.property(sample, fc.double({ min: 0.1, max: 10, noNaN: true }), (lots, scale) => {
			const of = (factor: number) =>
				computeDistribution(inputOf(lots.map((values) => [values.map((v) => v * factor)])))!;
			const [once, scaled] = [of(1), of(scale)];
			expect(scaled.mean).toBeCloseTo(once.mean + Math.log(scale), 12);
			expect(scaled.standardDeviation).toBeCloseTo(once.standardDeviation, 12);
			expect(scaled.components?.device.estimate ?? 0).toBeCloseTo(
				once.components?.device.estimate ?? 0,
				12
			);
			expect(scaled.extremes.lowest[0]! / scale).toBeCloseTo(once.extremes.lowest[0]!, 12);
		})
	);
});

it('reads a summary stored before there were components, normality and an origin', () => {
	const older = {
		characteristic: 'C_tot',
		conditionKey: 'T=25;f=1000000;VR=4',
		unit: 'F',
		transform: 'ln',
		sampleSize: 300,
		independentLots: 3,
		wafers: 12,
		mean: -24.9,
		standardDeviation: 0.018,
		skewness: 0.1,
		quantiles: [{ probability: 0.5, value: 15e-12 }],
		interpolated: false,
		sets: [1],
		uncertainty: 0.003,
		excluded: 0,
		quarantined: 1
	};
	expect(distributionSummary.parse(older)).toEqual({
		...older,
		origin: 'measured',
		normality: null,
		components: null
	});
});
