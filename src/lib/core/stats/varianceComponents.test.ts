import { expect, it } from 'vitest';
import { SampleTooSmallError, TooFewLotsError } from './errors';
import { groupSums } from './groupSums';
import { lotComponents, nestedComponents, poolGroups } from './varianceComponents';

const LOTS = [
	[3.1, 2.9, 3.4, 2.7, 2.8],
	[4.0, 4.4],
	[2.2, 2.6, 3.0, 3.3]
];

const NESTED = [
	[
		[3.1, 2.9, 3.4],
		[2.7, 2.8]
	],
	[[4.0, 4.4, 3.9, 4.1], [3.6], [4.2, 4.5]],
	[
		[2.2, 2.6],
		[3.0, 3.3, 2.9]
	]
];

// SciPy 1.17.1: stats.f_oneway; components from the mean squares of NumPy
it('takes an unbalanced one-way design apart', () => {
	const components = lotComponents(LOTS.map(groupSums));
	expect(components.fRatio).toBeCloseTo(10.80917966273615, 11);
	expect(components.pValue).toBeCloseTo(0.005322503522235317, 13);
	expect(components.effectiveLotSize).toBeCloseTo(3.4545454545454546, 13);
	expect(components.within.meanSquare).toBeCloseTo(0.13443749999999996, 14);
	expect(components.lot.estimate).toBeCloseTo(0.3817351973684209, 13);
	expect(components.mean).toBeCloseTo(3.127272727272727, 14);
	expect(components.total).toBeCloseTo(0.3817351973684209 + 0.1344375, 13);
});

// NumPy: sums of squares by projection matrices, coefficients as traces of their expectations
it('takes an unbalanced nested design apart', () => {
	const components = nestedComponents(NESTED.map((lot) => lot.map(groupSums)));
	expect(components.betweenLots.sumOfSquares).toBeCloseTo(6.10964705882345, 11);
	expect(components.betweenWafers.sumOfSquares).toBeCloseTo(1.0846666666667137, 11);
	expect(components.withinWafers.sumOfSquares).toBeCloseTo(0.48333333333333, 12);
	expect(components.coefficients[0]).toBeCloseTo(2.2, 13);
	expect(components.coefficients[1]).toBeCloseTo(2.7176470588235286, 13);
	expect(components.coefficients[2]).toBeCloseTo(5.588235294117644, 13);
	expect(components.lot.estimate).toBeCloseTo(0.4887456140350783, 12);
	expect(components.wafer.estimate).toBeCloseTo(0.1012878787878843, 12);
	expect(components.device.estimate).toBeCloseTo(0.048333333333333, 13);
	expect([components.sampleSize, components.lots, components.wafers]).toEqual([17, 3, 7]);
});

it('shows a negative estimate as zero and says so', () => {
	const alike = [groupSums([1, 3]), groupSums([1, 3.1]), groupSums([0.9, 3])];
	const { lot, device, total } = lotComponents(alike);
	expect(lot.estimate).toBeLessThan(0);
	expect(lot).toMatchObject({ variance: 0, isNegative: true });
	expect(total).toBe(device.variance);
});

it('pools groups without the devices', () => {
	const pooled = poolGroups(LOTS.map(groupSums));
	const direct = groupSums(LOTS.flat());
	expect(pooled.sampleSize).toBe(11);
	expect(pooled.mean).toBeCloseTo(direct.mean, 14);
	expect(pooled.sumOfSquares).toBeCloseTo(direct.sumOfSquares, 13);
});

it('refuses a single lot, and designs that leave nothing to estimate from', () => {
	expect(() => lotComponents([groupSums([1, 2])])).toThrow(TooFewLotsError);
	expect(() => lotComponents([groupSums([1]), groupSums([2])])).toThrow(SampleTooSmallError);
	const oneWafer = [[groupSums([1, 2])], [groupSums([2, 3])]];
	expect(() => nestedComponents(oneWafer)).toThrow('at least 3 devices, got 2');
	expect(() => nestedComponents(oneWafer.slice(1))).toThrow(TooFewLotsError);
	const oneDevice = [[groupSums([1]), groupSums([2])], [groupSums([2])]];
	expect(() => nestedComponents(oneDevice)).toThrow(SampleTooSmallError);
});
