import { describe, expect, it } from 'vitest';
import { enteredDistribution, type EnteredSummary } from './enteredDistribution';
import { enteredRequest } from './enteredRequest';
import { EnteredDistributionError } from './errors';
import { distributionSummary } from './summary';
import { usableEntered } from './usableEntered';

const summary: EnteredSummary = {
	characteristic: 'C_tot',
	conditionKey: 'T=25;f=1000000;VR=4',
	unit: 'F',
	transform: 'ln',
	n: 75,
	mean: Math.log(15e-12),
	standardDeviation: 0.018
};

describe('a summary that was entered', () => {
	it('is a marked distribution without devices', () => {
		const { groups, extremes, ...entered } = enteredDistribution(summary);
		expect(distributionSummary.parse(entered)).toEqual(entered);
		expect(entered).toMatchObject({
			origin: 'entered',
			sampleSize: 75,
			independentLots: 0,
			wafers: 0,
			sets: [],
			uncertainty: null,
			normality: null,
			components: null
		});
		expect(groups).toEqual([]);
		expect(extremes).toEqual({ lowest: [], highest: [] });
	});

	// By hand: exp(ln 15 pF); 10^(−9); the mean itself.
	it.each([
		['ln', Math.log(15e-12), 15e-12],
		['log10', -9, 1e-9],
		['identity', 0.35, 0.35]
	] as const)('has the mean turned back by %s as its median', (transform, mean, median) => {
		const { quantiles } = enteredDistribution({ ...summary, transform, mean });
		expect(quantiles).toHaveLength(1);
		expect(quantiles[0]?.probability).toBe(0.5);
		expect(quantiles[0]!.value / median).toBeCloseTo(1, 12);
	});

	it.each([
		[{ n: 1 }, 'two devices', 1],
		[{ n: 7.5 }, 'two devices', 7.5],
		[{ mean: Infinity }, 'a finite mean', Infinity],
		[{ standardDeviation: -0.1 }, 'a deviation of zero or more', -0.1],
		[{ standardDeviation: Number.NaN }, 'a deviation of zero or more', Number.NaN]
	])('is refused with %o', (change, requirement, actual) => {
		expect(() => enteredDistribution({ ...summary, ...change })).toThrow(
			new EnteredDistributionError(requirement, actual)
		);
	});
});

describe('where it is used', () => {
	const MEASURED = ['T=25;f=1000000;VR=0', 'T=25;f=1000000;VR=10'];

	it.each([
		['inside the measured range', 'T=25;f=1000000;VR=4', false],
		['at its end', 'T=25;f=1000000;VR=10', false],
		['beyond it', 'T=25;f=1000000;VR=10.5', true],
		['at another frequency', 'T=25;f=100000;VR=4', true],
		['at another temperature', 'T=85;f=1000000;VR=4', true]
	])('%s: %s', (_, conditionKey, isUsed) => {
		const entered = enteredDistribution({ ...summary, conditionKey });
		const measured = { keys: MEASURED, areSweeps: true };
		expect(usableEntered([entered], measured)).toEqual(isUsed ? [entered] : []);
	});
});

it('is used at any condition of single readings but those that were measured', () => {
	const entered = ['T=25;VR=10', 'T=25;VR=20', 'T=25;VR=30'].map((conditionKey) => ({
		conditionKey
	}));
	const measured = { keys: ['T=25;VR=10', 'T=25;VR=30'], areSweeps: false };
	expect(usableEntered(entered, measured)).toEqual([{ conditionKey: 'T=25;VR=20' }]);
});

describe('the request to enter one', () => {
	const request = {
		characteristic: 'C_tot',
		temperatureCelsius: 25,
		frequency: 1e6,
		reverseVoltage: 4,
		n: 75,
		mean: -24.9,
		standardDeviation: 0.018,
		reason: ' Only the report is left. ',
		source: 'Report 12'
	};

	it('is read, its words trimmed', () => {
		expect(enteredRequest.parse(request)).toEqual({
			...request,
			reason: 'Only the report is left.'
		});
	});

	it.each([
		['no reason', { reason: '  ' }, 'reason'],
		['no source', { source: '' }, 'source'],
		['one device', { n: 1 }, 'n'],
		['a negative deviation', { standardDeviation: -1 }, 'standardDeviation'],
		['a mean in words', { mean: '15 pF' }, 'mean']
	])('is refused with %s', (_, change, path) => {
		const parsed = enteredRequest.safeParse({ ...request, ...change });
		expect(parsed.error?.issues.map((issue) => issue.path.join('.'))).toEqual([path]);
	});

	it('is refused with a member it does not know', () => {
		expect(enteredRequest.safeParse({ ...request, sigma: 1 }).success).toBe(false);
	});
});
