import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { computeDistribution, type DistributionInput } from './computeDistribution';
import { TransformDomainError } from './errors';

const LOTS = {
	A: [14.71, 14.93, 15.02, 14.88],
	B: [15.21, 15.4, 15.11],
	C: [14.5, 14.62, 14.99, 14.7, 14.81]
};
const NAMES = Object.keys(LOTS).map((lot) => ({ lot, waferLot: lot, wafer: '1' }));

const input: DistributionInput = {
	characteristic: 'C_tot',
	conditionKey: 'T=25;VR=4',
	unit: 'F',
	transform: 'ln',
	values: Float64Array.from(Object.values(LOTS).flat()),
	groupOf: Int32Array.from(Object.values(LOTS).flatMap((lot, group) => lot.map(() => group))),
	groups: NAMES,
	sets: [7],
	uncertainty: 0.003,
	excluded: 1,
	quarantined: 2
};

describe('twelve devices of three lots', () => {
	const distribution = computeDistribution(input);

	// R 4.2.2: y <- log(c(…)); mean(y); sd(y); m <- y - mean(y); mean(m^3)/mean(m^2)^1.5
	it('has the moments R finds', () => {
		expect(distribution?.mean).toBeCloseTo(2.70167089598399, 13);
		expect(distribution?.standardDeviation).toBeCloseTo(0.0173180652276907, 14);
		expect(distribution?.skewness).toBeCloseTo(0.243548784221963, 11);
	});

	// R 4.2.2: quantile(x, c(.05, .1, .25, .5, .9), type = 8)
	it.each([
		[0.05, 14.5],
		[0.1, 14.568],
		[0.25, 14.7041666666667],
		[0.5, 14.905],
		[0.9, 15.2923333333333]
	])('has the type-8 quantile at %f that R finds', (probability, value) => {
		const found = distribution?.quantiles.find((at) => at.probability === probability);
		expect(found?.value).toBeCloseTo(value, 11);
	});

	// R 4.2.2: tapply(y, lot, mean); tapply(y, lot, function(v) sum((v - mean(v))^2))
	it.each([
		['A', 4, 2.70032520547634, 0.000230603313640879],
		['B', 3, 2.72389246399181, 0.000186345649716601],
		['C', 5, 2.68941450758541, 0.000642387183346593]
	])('keeps the sums of lot %s', (lot, sampleSize, mean, sumOfSquares) => {
		const group = distribution?.groups.find((of) => of.lot === lot);
		expect(group?.sampleSize).toBe(sampleSize);
		expect(group?.mean).toBeCloseTo(mean, 13);
		expect(group?.sumOfSquares).toBeCloseTo(sumOfSquares, 15);
	});

	it('says what is behind it', () => {
		expect(distribution).toMatchObject({
			sampleSize: 12,
			independentLots: 3,
			wafers: 3,
			sets: [7],
			uncertainty: 0.003,
			excluded: 1,
			quarantined: 2,
			interpolated: false
		});
		expect(distribution?.groups[1]).toMatchObject({ lowest: 15.11, highest: 15.4 });
	});
});

it('counts independent lots by wafer lot', () => {
	const groups = NAMES.map((name) => ({ ...name, waferLot: name.lot === 'C' ? 'B' : name.lot }));
	expect(computeDistribution({ ...input, groups })?.independentLots).toBe(2);
});

it('leaves devices without a value out, and groups that are left with none', () => {
	const values = input.values.map((value, device) => (device < 4 ? Number.NaN : value));
	const distribution = computeDistribution({ ...input, values });
	expect(distribution?.sampleSize).toBe(8);
	expect(distribution?.groups.map((of) => of.lot)).toEqual(['B', 'C']);
});

it('has no distribution where no device has a value', () => {
	const values = input.values.map(() => Number.NaN);
	expect(computeDistribution({ ...input, values })).toBeUndefined();
});

it('refuses the logarithm of zero', () => {
	const values = input.values.map((value, device) => (device === 3 ? 0 : value));
	expect(() => computeDistribution({ ...input, values })).toThrow(
		new TransformDomainError('ln', 0)
	);
	expect(computeDistribution({ ...input, values, transform: 'identity' })?.sampleSize).toBe(12);
});

it('keeps the spread of values that differ in the twelfth digit', () => {
	// By hand: half of the devices 2⁻⁴⁰ higher. A mean near 1 is exact to 2⁻⁵³ = 1.1e-16, no better.
	const values = Float64Array.from({ length: 12 }, (_, i) => 1 + (i % 2) * 2 ** -40);
	const distribution = computeDistribution({ ...input, values, transform: 'identity' });
	expect(distribution?.standardDeviation).toBeCloseTo(2 ** -41 * Math.sqrt(12 / 11), 16);
});

it('is the same to the last bit in whatever order the devices come', () => {
	const device = fc.record({
		group: fc.integer({ min: 0, max: 2 }),
		value: fc.double({ min: 1e-13, max: 1e-9, noNaN: true })
	});
	fc.assert(
		fc.property(
			fc.array(device, { minLength: 2, maxLength: 60 }),
			fc.infiniteStream(fc.nat()),
			(devices, order) => {
				const shuffled: typeof devices = devices
					.map((of) => ({ of, key: Number(order.next().value) }))
					.sort((a, b) => a.key - b.key)
					.map(({ of }) => of);
				const summed = (list: typeof devices) =>
					computeDistribution({
						...input,
						values: Float64Array.from(list, (of) => of.value),
						groupOf: Int32Array.from(list, (of) => of.group)
					});
				expect(summed(shuffled)).toEqual(summed(devices));
			}
		)
	);
});

it('finds no spread at all in devices that are all alike, in however many lots', () => {
	fc.assert(
		fc.property(
			fc.double({ min: 1e-13, max: 1e-9, noNaN: true }),
			fc.array(fc.integer({ min: 0, max: 2 }), { minLength: 2, maxLength: 40 }),
			(value, lots) => {
				const distribution = computeDistribution({
					...input,
					values: Float64Array.from(lots, () => value),
					groupOf: Int32Array.from(lots)
				});
				expect(distribution?.standardDeviation).toBe(0);
			}
		)
	);
});
