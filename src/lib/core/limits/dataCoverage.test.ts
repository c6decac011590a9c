import { describe, expect, it } from 'vitest';
import { dataCoverage, policyNeed } from './dataCoverage';
import { limitPolicy } from './policy';

const count = (series: string, lots: Record<string, number>, characteristic = 'C_tot') => ({
	characteristic,
	series,
	sampleSize: Object.values(lots).reduce((sum, each) => sum + each, 0),
	lots: Object.entries(lots).map(([name, devices]) => ({ name, devices }))
});

describe('the coverage of data', () => {
	const { lots, series } = dataCoverage([
		count('25 °C', { B: 50, A: 40 }),
		count('25 °C', { A: 38 }),
		count('85 °C', { A: 40 }),
		count('25 °C', { C: 7 }, 'V_F')
	]);

	it('has a column a lot and a row a series', () => {
		expect(lots).toEqual(['A', 'B', 'C']);
		expect(series.map((of) => `${of.characteristic} ${of.series}`)).toEqual([
			'C_tot 25 °C',
			'C_tot 85 °C',
			'V_F 25 °C'
		]);
	});

	it('shows a lot measured at one bias of two, and one that is missing', () => {
		expect(series[0]?.cells).toEqual([
			{ lot: 'A', devices: 40, conditions: 2 },
			{ lot: 'B', devices: 50, conditions: 1 },
			{ lot: 'C', devices: 0, conditions: 0 }
		]);
	});

	it('rests on the bias where fewest were measured', () => {
		expect(series[0]).toMatchObject({ conditions: 2, fewestDevices: 38, fewestLots: 1 });
	});
});

describe('what a policy would need more of', () => {
	const policy = (method: 'order' | 'lots', tails: 'each' | 'both') =>
		limitPolicy.parse({
			name: 'Any',
			method,
			content: 0.99,
			confidence: 0.95,
			tails,
			minimumLots: 3,
			minimumDevices: 30,
			resolution: { significantFigures: 3 }
		});

	it('is lots and devices up to its gates', () => {
		expect(policyNeed(policy('lots', 'each'), { fewestDevices: 22, fewestLots: 2 })).toEqual({
			lots: 3,
			devices: 30,
			moreLots: 1,
			moreDevices: 8
		});
	});

	// 0.99^n ≤ 0.025 from n = ln 0.025/ln 0.99 = 367.04 on: 368. Both together, Wilks 1941: 473.
	it.each([
		['each', 368],
		['both', 473]
	] as const)('is for order statistics, %s, what the confidence takes', (tails, required) => {
		const found = policyNeed(policy('order', tails), { fewestDevices: 300, fewestLots: 8 });
		expect(found).toMatchObject({ devices: required, moreDevices: required - 300, moreLots: 0 });
	});

	it('is nothing where there is enough', () => {
		const found = policyNeed(policy('lots', 'each'), { fewestDevices: 30, fewestLots: 3 });
		expect(found).toMatchObject({ moreLots: 0, moreDevices: 0 });
	});
});
