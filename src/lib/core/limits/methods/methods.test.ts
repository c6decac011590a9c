import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { enteredDistribution } from '../../distributions/enteredDistribution';
import { limitMessages } from '../../messages/limits';
import { computeLimitRow } from '../computeLimitRow';
import type { LimitRow } from '../limit';
import { AT_FOUR_VOLTS, PLAIN_POLICY, threeSmallLots, withValues } from '../limitTestData';
import type { LimitPolicy } from '../policy';

const rowBy = (rules: Partial<LimitPolicy>, distribution = threeSmallLots(), sides?: LimitSides) =>
	computeLimitRow(
		distribution,
		{ ...PLAIN_POLICY, ...rules },
		sides === undefined ? AT_FOUR_VOLTS : { ...AT_FOUR_VOLTS, sides }
	);
type LimitSides = readonly ('minimum' | 'maximum')[];
const inPicofarad = (row: LimitRow) =>
	[row.minimum, row.maximum].map((of) => (of === null ? null : of.raw * 1e12));
const factorOf = (row: LimitRow) => row.maximum?.factor ?? Number.NaN;

/** n devices of one lot, 10 pF to 11 pF at equal steps. */
const evenly = (n: number) =>
	withValues([Array.from({ length: n }, (_, i) => 10 + i / (n - 1))], { independentLots: 3 });

describe('normal, content between both limits', () => {
	// SciPy 1.10.1: brentq over 2∫φ(z)·chi2.sf(11·r(z)²/k², 11)dz = 0.95, r from Φ(x + r) − Φ(x − r) = 0.99
	it('takes the exact two-sided factor', () => {
		const row = rowBy({ tails: 'both' });
		expect(row.minimum?.derivation.some(({ name }) => name === 'Factor k₂')).toBe(true);
		expect(factorOf(row)).toBeCloseTo(4.155508121180967, 9);
	});

	it('is one-sided where only a maximum is promised', () => {
		const alone = rowBy({ tails: 'both' }, threeSmallLots(), ['maximum']);
		expect(factorOf(alone)).toBeCloseTo(3.747084893936731, 9);
	});
});

describe('order', () => {
	// ISO 16269-6: with 473 devices the extremes hold 0.99 between them at 0.95 (two left out).
	it('takes the extremes where they are just enough', () => {
		expect(inPicofarad(rowBy({ method: 'order', tails: 'both' }, evenly(473)))).toEqual([10, 11]);
		expect(rowBy({ method: 'order', tails: 'both' }, evenly(472)).refusals).toEqual([
			limitMessages.orderNeedsMore(473, 472, 2)
		]);
	});

	// R 4.2.2: qbinom(0.05, 1000, 0.01) = 5: the fifth from above is sure enough, the sixth not.
	it('goes inside as far as the confidence allows', () => {
		const row = rowBy({ method: 'order' }, evenly(1000), ['maximum']);
		expect(row.maximum?.derivation.find(({ name }) => name === 'Rank from above')?.value).toBe(5);
		expect((row.maximum?.raw ?? 0) * 1e12).toBeCloseTo(11 - 4 / 999, 9);
	});

	it('stops at the deepest device that is stored', () => {
		const row = rowBy({ method: 'order', content: 0.5 }, evenly(2000), ['minimum']);
		expect(row.minimum?.derivation.find(({ name }) => name === 'Rank from below')?.value).toBe(512);
	});
});

describe('censored readings', () => {
	const zeros = { atOrBelow: 4, floor: 1e-10, atOrAbove: 0, ceiling: null };
	const leakage = () =>
		withValues([Array.from({ length: 71 }, (_, i) => 200 * Math.exp(0.3 * Math.sin(i * 1.7)))], {
			sampleSize: 75,
			censoring: zeros,
			uncertainty: 0
		});

	it('are counted and said, with n = 75', () => {
		const row = rowBy({}, leakage(), ['maximum']);
		expect(row.sampleSize).toBe(75);
		expect(row.warnings).toContain(limitMessages.censored(4, 75));
		const alone = rowBy(
			{},
			withValues([Array.from({ length: 71 }, (_, i) => 200 * Math.exp(0.3 * Math.sin(i * 1.7)))]),
			['maximum']
		);
		expect(row.maximum?.raw ?? 0).toBeGreaterThan(alone.maximum?.raw ?? Infinity);
	});

	it('are refused for future lots and for content between both', () => {
		expect(rowBy({ method: 'lots' }, leakage()).refusals).toContain(
			limitMessages.lotsNeedNumbers()
		);
		expect(rowBy({ tails: 'both' }, leakage()).refusals).toEqual([
			limitMessages.bothTailsNeedNumbers()
		]);
	});

	it('can be the minimum of no order statistic', () => {
		const rules = { method: 'order', content: 0.9 } as const;
		expect(rowBy(rules, leakage(), ['minimum']).refusals).toEqual([
			limitMessages.rankCensored('minimum', 3)
		]);
	});
});

describe('an entered summary', () => {
	const entered = enteredDistribution({
		characteristic: 'C_tot',
		conditionKey: 'T=25;f=1000000;VR=4',
		unit: 'F',
		transform: 'ln',
		n: 12,
		mean: Math.log(14.9e-12),
		standardDeviation: 0.0173
	});

	it('gives normal limits, and says what it is', () => {
		const row = rowBy({}, entered);
		expect((row.maximum?.raw ?? 0) * 1e12).toBeCloseTo(14.9 * Math.exp(4.123689596 * 0.0173), 6);
		expect(row.warnings).toContain(limitMessages.enteredSummary());
		expect(row.minimum?.derivation[0]?.name).toBe('Entered summary');
	});

	it.each([
		['lots', { method: 'lots' }, limitMessages.enteredHasNoLots()],
		['order', { method: 'order' }, limitMessages.orderNeedsDevices()],
		['a policy that counts lots', { minimumLots: 3 }, limitMessages.enteredLotsUnknown(3)]
	] as const)('cannot answer %s', (_, rules, sentence) => {
		expect(rowBy(rules, entered).refusals).toContain(sentence);
	});
});

describe('future lots', () => {
	it('need three lots', () => {
		const two = withValues([
			[15, 15.1],
			[15.2, 15.3]
		]);
		expect(rowBy({ method: 'lots' }, two).refusals).toEqual([limitMessages.lotsNeedLots(3, 2)]);
	});

	it('need lots of several devices', () => {
		expect(rowBy({ method: 'lots' }, withValues([[15], [15.1], [15.3]])).refusals).toEqual([
			limitMessages.lotsNeedRepeats()
		]);
	});

	it('lie further out than those of one population', () => {
		const [lots, one] = (['lots', 'normal'] as const).map((method) => factorOf(rowBy({ method })));
		expect(lots).toBeGreaterThan(one ?? Infinity);
	});
});

const population = fc.array(
	fc.array(fc.double({ min: 14, max: 16, noNaN: true }), { minLength: 3, maxLength: 8 }),
	{ minLength: 3, maxLength: 5 }
);
const promise = fc.record({
	content: fc.double({ min: 0.9, max: 0.999, noNaN: true }),
	confidence: fc.double({ min: 0.5, max: 0.99, noNaN: true })
});

describe('whatever the devices', () => {
	it.each([
		['lots', 'each'],
		['lots', 'both'],
		['normal', 'both']
	] as const)('more content or confidence never tightens: %s, %s', (method, tails) => {
		fc.assert(
			fc.property(population, promise, promise, (lots, one, other) => {
				const most = (key: 'content' | 'confidence') => Math.max(one[key], other[key]);
				const strong = { content: most('content'), confidence: most('confidence') };
				const [loose, tight] = [strong, one].map((rules) =>
					rowBy({ method, tails, ...rules }, withValues(lots))
				);
				fc.pre(loose?.minimum != null && tight?.minimum != null);
				fc.pre(loose?.maximum != null && tight?.maximum != null);
				expect(loose?.minimum?.raw).toBeLessThanOrEqual((tight?.minimum?.raw ?? 0) * (1 + 1e-9));
				expect(loose?.maximum?.raw).toBeGreaterThanOrEqual((tight?.maximum?.raw ?? 0) * (1 - 1e-9));
			}),
			{ numRuns: 25 }
		);
	});

	it('the order of lots changes no limit for future lots', () => {
		fc.assert(
			fc.property(population, (lots) => {
				const row = rowBy({ method: 'lots' }, withValues(lots));
				const turned = rowBy({ method: 'lots' }, withValues(lots.toReversed()));
				expect([turned.minimum?.text, turned.maximum?.text]).toEqual([
					row.minimum?.text,
					row.maximum?.text
				]);
			}),
			{ numRuns: 15 }
		);
	});
});
