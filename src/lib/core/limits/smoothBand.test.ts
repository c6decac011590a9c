import { describe, expect, it } from 'vitest';
import type { Distribution } from '../distributions/summary';
import type { LimitValue } from './limit';
import { smoothBand } from './smoothBand';

const distribution = (median: number, standardDeviation: number): Distribution => ({
	characteristic: 'C_tot',
	conditionKey: 'T=25',
	unit: 'F',
	transform: 'ln',
	sampleSize: 100,
	independentLots: 3,
	wafers: 3,
	mean: Math.log(median),
	standardDeviation,
	skewness: 0,
	quantiles: [{ probability: 0.5, value: median }],
	interpolated: false,
	sets: [1],
	uncertainty: null,
	excluded: 0,
	quarantined: 0,
	origin: 'measured',
	normality: null,
	components: null,
	groups: [],
	extremes: { lowest: [], highest: [] }
});
const value = (raw: number): LimitValue => ({ raw, printed: raw, text: '', derivation: [] });
/** Limits k standard deviations of ln C below and above the median. */
const measured = (bias: number, median: number, deviation: number, k: number) => ({
	limit: {
		condition: { temperatureCelsius: 25, reverseVoltage: bias },
		minimum: value(median * Math.exp(-k * deviation)),
		maximum: value(median * Math.exp(k * deviation))
	},
	distribution: distribution(median, deviation)
});

describe('a band between measured biases', () => {
	const ends = [measured(1, 20, 0.02, 3), measured(3, 10, 0.04, 4)];

	it('keeps the measured limits as they are', () => {
		const band = smoothBand(ends, []);
		expect(band.map(({ bias }) => bias)).toEqual([1, 3]);
		expect(band[0]?.minimum).toBeCloseTo(20 * Math.exp(-0.06), 12);
		expect(band[1]?.maximum).toBeCloseTo(10 * Math.exp(0.16), 12);
	});

	it('stands at the neighbours’ distance, in its own deviations from its own median', () => {
		const band = smoothBand(ends, [{ bias: 2, distribution: distribution(14, 0.03) }]);
		// Halfway: 3.5 deviations of 0.03 about 14.
		expect(band[1]).toMatchObject({ bias: 2, typical: 14 });
		expect(band[1]?.minimum).toBeCloseTo(14 * Math.exp(-0.105), 12);
		expect(band[1]?.maximum).toBeCloseTo(14 * Math.exp(0.105), 12);
	});

	it('has no limit where a neighbour has none, and nothing beyond the measured range', () => {
		const open = [{ ...ends[0]!, limit: { ...ends[0]!.limit, minimum: null } }, ends[1]!];
		const band = smoothBand(open, [
			{ bias: 2, distribution: distribution(14, 0.03) },
			{ bias: 5, distribution: distribution(7, 0.03) }
		]);
		expect(band.map(({ bias }) => bias)).toEqual([1, 2, 3]);
		expect(band[1]?.minimum).toBeNull();
		expect(band[1]?.maximum).not.toBeNull();
	});
});
