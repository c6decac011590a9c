import { describe, expect, it } from 'vitest';
import { censoredMaximum, censoredMaximumOfSums } from '../stats/censoredNormal';
import { censorReadings } from './censorReadings';
import { censoredSums } from './censoredSums';
import { computeDistribution, type DistributionInput } from './computeDistribution';
import { CensoringError } from './errors';

/** 75 leakage currents of three lots in nA; the four that read 0 lie below the floor of 0.1 nA. */
const LEAKAGE = Array.from({ length: 75 }, (_, i) =>
	i % 19 === 7 ? 0 : 0.15 + ((i * 37) % 75) / 50
);
const FLOOR = 0.1e-9;
const readings = Float64Array.from(LEAKAGE, (value) => value * 1e-9);

const exact = {
	characteristic: 'I_R',
	conditionKey: 'T=25;VR=10',
	unit: 'A',
	transform: 'ln',
	values: readings,
	groupOf: Int32Array.from(LEAKAGE, (_, i) => i % 3),
	groups: ['A', 'B', 'C'].map((lot) => ({ lot, waferLot: lot, wafer: '1' })),
	sets: [1],
	uncertainty: null,
	excluded: 0,
	quarantined: 0
} satisfies DistributionInput;
const input = { ...exact, ...censorReadings(readings, { floor: FLOOR }) };

describe('leakage of 75 devices, four of them at the floor', () => {
	const distribution = computeDistribution(input)!;
	const observed = LEAKAGE.filter((value) => value > 0).map((value) => Math.log(value * 1e-9));

	it('counts all 75, and says how many are censored', () => {
		expect(LEAKAGE.filter((value) => value === 0)).toHaveLength(4);
		expect(distribution.sampleSize).toBe(75);
		expect(distribution.independentLots).toBe(3);
		expect(distribution.censoring).toEqual({
			atOrBelow: 4,
			floor: FLOOR,
			atOrAbove: 0,
			ceiling: null
		});
	});

	it('has mean and spread of the 71 that were observed', () => {
		const mean = observed.reduce((sum, y) => sum + y, 0) / 71;
		const squares = observed.reduce((sum, y) => sum + (y - mean) ** 2, 0);
		expect(distribution.mean).toBeCloseTo(mean, 12);
		expect(distribution.standardDeviation).toBeCloseTo(Math.sqrt(squares / 70), 12);
		expect(distribution.groups.reduce((sum, of) => sum + of.sampleSize, 0)).toBe(71);
		expect(distribution.normality).toBeNull();
		expect(distribution.components).toBeNull();
	});

	// h = (75 + 1/3)·p + 1/3 is 4.1 at 5 %: between the fourth device, at the floor, and the fifth.
	it('marks the quantiles that rest on a censored device', () => {
		const at = (p: number) => distribution.quantiles.find(({ probability }) => probability === p)!;
		expect(at(0)).toEqual({ probability: 0, value: FLOOR, bound: 'atMost' });
		expect(at(0.05).bound).toBe('atMost');
		expect(at(0.1).bound).toBeUndefined();
		expect(at(0.5).bound).toBeUndefined();
	});

	it('keeps the censored devices at the floor among the outermost', () => {
		expect(distribution.extremes.lowest.slice(0, 5)).toEqual([
			FLOOR,
			FLOOR,
			FLOOR,
			FLOOR,
			expect.closeTo(0.15e-9, 20)
		]);
		expect(distribution.extremes.highest).toHaveLength(75);
	});

	it('gives the censored limit from its sums that the devices give', () => {
		const promise = { content: 0.99, confidence: 0.95 };
		const floor = Math.log(FLOOR);
		const ofDevices = censoredMaximum(
			{ exact: observed, atMost: [floor, floor, floor, floor], atLeast: [] },
			promise
		);
		expect(censoredMaximumOfSums(censoredSums(distribution), promise)).toBeCloseTo(ofDevices, 10);
	});
});

it('turns several floors into the largest, at which what is below is censored too', () => {
	const values = Float64Array.of(1, 2, 1.5, 4, 5);
	const distribution = computeDistribution({
		...input,
		transform: 'identity',
		values,
		censored: Int8Array.of(-1, -1, 0, 0, 1),
		groupOf: Int32Array.of(0, 0, 0, 1, 2)
	})!;
	expect(distribution.censoring).toEqual({ atOrBelow: 3, floor: 2, atOrAbove: 1, ceiling: 5 });
	expect(distribution.extremes.lowest).toEqual([2, 2, 2, 4, 5]);
	expect(distribution.groups.map(({ lot, sampleSize }) => [lot, sampleSize])).toEqual([['B', 1]]);
	expect(distribution.independentLots).toBe(3);
});

it('is what it was when nothing is censored', () => {
	const values = readings.map((value) => value + 1e-9);
	const flags = new Int8Array(75);
	const distribution = computeDistribution({ ...input, values, censored: flags });
	expect(distribution).toEqual(computeDistribution({ ...exact, values }));
	expect(distribution).not.toHaveProperty('censoring');
});

it('says of devices that all lie at the floor only that', () => {
	const all = censorReadings(
		readings.map(() => 0),
		{ floor: FLOOR }
	);
	const distribution = computeDistribution({ ...input, ...all })!;
	expect(distribution).toMatchObject({
		sampleSize: 75,
		mean: Math.log(FLOOR),
		standardDeviation: 0,
		groups: [],
		censoring: { atOrBelow: 75, floor: FLOOR }
	});
	expect(distribution.quantiles.every(({ bound }) => bound === 'atMost')).toBe(true);
});

it('refuses a floor that is not below the ceiling', () => {
	expect(() => censorReadings(readings, { floor: 2, ceiling: 1 })).toThrow(
		new CensoringError(2, 1)
	);
	const crossed = {
		...input,
		values: Float64Array.of(3, 1),
		censored: Int8Array.of(-1, 1),
		groupOf: Int32Array.of(0, 1)
	};
	expect(() => computeDistribution(crossed)).toThrow(new CensoringError(3, 1));
});
