import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { limitationMessages } from '../messages/limitations';
import { limitMessages } from '../messages/limits';
import { roundOutward } from '../units/rounding';
import { computeLimitRow } from './computeLimitRow';
import { readDigits } from './digits';
import { limitRow, type LimitRow, type LimitValue } from './limit';
import { AT_FOUR_VOLTS, PLAIN_POLICY, threeSmallLots, withValues } from './limitTestData';
import type { LimitPolicy } from './policy';

const rowBy = (rules: Partial<LimitPolicy>, distribution = threeSmallLots()) =>
	computeLimitRow(distribution, { ...PLAIN_POLICY, ...rules }, AT_FOUR_VOLTS);
const lineOf = (value: LimitValue | null, name: string) =>
	value?.derivation.find((step) => step.name === name);

describe('normal', () => {
	const row = rowBy({});

	// SciPy 1.17.1: nct.ppf(0.975, 11, norm.ppf(0.99)*sqrt(12))/sqrt(12) = 4.123689596211012;
	// mean and sd of ln C from R 4.2.2: 2.70167089598399, 0.0173180652276907
	it('is exp(mean ∓ k₁·s), with the confidence shared between min and max', () => {
		const [mean, deviation, factor] = [2.70167089598399, 0.0173180652276907, 4.123689596211012];
		expect((row.minimum?.raw ?? 0) * 1e12).toBeCloseTo(Math.exp(mean - factor * deviation), 9);
		expect((row.maximum?.raw ?? 0) * 1e12).toBeCloseTo(Math.exp(mean + factor * deviation), 9);
	});

	// SciPy 1.17.1: nct.ppf(0.95, 11, norm.ppf(0.99)*sqrt(12))/sqrt(12)
	it('takes the whole confidence when one side alone is promised', () => {
		const alone = computeLimitRow(threeSmallLots(), PLAIN_POLICY, {
			...AT_FOUR_VOLTS,
			sides: ['minimum']
		});
		expect(lineOf(alone.minimum, 'Factor k₁')?.value).toBeCloseTo(3.747084893936731, 9);
		expect(alone.maximum).toBeNull();
		expect(alone.basis).toBe('characterized');
	});

	it('prints the type-8 median to nearest as typical', () => {
		// R 4.2.2: quantile(x, 0.5, type = 8) = 14.905
		expect(row.typical).toMatchObject({ raw: 1.4905e-11, text: '14.9', printed: 1.49e-11 });
	});

	it('stands on its schema and has nothing to refuse', () => {
		expect(limitRow.parse(row)).toEqual(row);
		expect(row).toMatchObject({ basis: 'characterized', refusals: [], sampleSize: 12 });
	});

	it('warns of a content the sample cannot speak about', () => {
		expect(rowBy({ content: 0.999999 }).warnings).toContain(
			limitMessages.contentBeyondSample(0.999999, 12)
		);
		expect(row.warnings).not.toContain(limitMessages.contentBeyondSample(0.99, 12));
	});
});

describe('sigma', () => {
	const rules = { ...PLAIN_POLICY, method: 'sigma', k: 4 } as const;

	it('is mean ± kσ behind a test of every device', () => {
		const row = computeLimitRow(threeSmallLots(), rules, {
			...AT_FOUR_VOLTS,
			declaredBasis: 'tested'
		});
		const [mean, deviation] = [2.70167089598399, 0.0173180652276907];
		expect((row.minimum?.raw ?? 0) * 1e12).toBeCloseTo(Math.exp(mean - 4 * deviation), 9);
		expect((row.maximum?.raw ?? 0) * 1e12).toBeCloseTo(Math.exp(mean + 4 * deviation), 9);
		expect(row.basis).toBe('tested');
	});

	it('is refused as a guarantee by itself', () => {
		const row = rowBy(rules);
		expect([row.minimum, row.maximum, row.basis]).toEqual([null, null, 'typical']);
		expect(row.refusals).toEqual([limitMessages.sigmaNeedsTest(4)]);
		expect(row.typical?.text).toBe('14.9');
	});
});

describe('what is refused', () => {
	it.each<[string, Partial<LimitPolicy>, string]>([
		['order of few', { method: 'order' }, limitMessages.orderNeedsMore(368, 12, 2)],
		[
			'order of few between both',
			{ method: 'order', tails: 'both' },
			limitMessages.orderNeedsMore(473, 12, 2)
		],
		['too few lots', { minimumLots: 4 }, limitMessages.tooFewLots(4, 3)],
		['too few devices', { minimumDevices: 30 }, limitMessages.tooFewDevices(30, 12)]
	])('%s', (_, rules, sentence) => {
		const row = rowBy(rules);
		expect(row.refusals).toEqual([sentence]);
		expect([row.minimum, row.maximum, row.basis]).toEqual([null, null, 'typical']);
		expect(row.typical?.text).toBe('14.9');
	});

	it('a single device', () => {
		const row = rowBy({ minimumDevices: 2 }, withValues([[15]]));
		expect(row.refusals).toContain(limitMessages.tooFewDevices(2, 1));
		expect(row.minimum).toBeNull();
	});

	it('a minimum that rounds to nothing', () => {
		const row = rowBy({ resolution: { step: 50 } });
		expect(row.refusals).toEqual([limitMessages.nothingLeft()]);
	});

	it('values so lopsided that the median lies outside', () => {
		const lopsided = withValues([Array.from({ length: 99 }, () => 1), [1e9]]);
		expect(rowBy({ content: 0.5, confidence: 0.5 }, lopsided).refusals).toEqual([
			limitMessages.medianOutside()
		]);
	});
});

describe('what is warned of', () => {
	it('sweeps in quarantine', () => {
		expect(rowBy({}, threeSmallLots({ quarantined: 2 })).warnings).toContain(
			limitMessages.quarantined(2)
		);
	});

	it('an uncertainty nobody stated', () => {
		expect(rowBy({}, threeSmallLots({ uncertainty: null })).warnings).toContain(
			limitMessages.uncertaintyNotStated()
		);
		expect(rowBy({}, threeSmallLots({ uncertainty: 0 })).warnings).not.toContain(
			limitMessages.uncertaintyNotStated()
		);
	});

	it('a limit that equals the typical value', () => {
		const row = rowBy(
			{},
			withValues([
				[15, 15, 15],
				[15, 15]
			])
		);
		expect([row.minimum?.text, row.typical?.text, row.maximum?.text]).toEqual([
			'15.0',
			'15.0',
			'15.0'
		]);
		expect(row.warnings).toEqual([
			limitationMessages.pooledLots(),
			limitMessages.equalsTypical('minimum'),
			limitMessages.equalsTypical('maximum')
		]);
	});
});

describe('allowances', () => {
	const row = rowBy({ drift: 0.005 }, threeSmallLots({ uncertainty: 0.003 }));

	it('move the limits outwards one after the other', () => {
		const raw = (row.minimum?.raw ?? 0) * 1e12;
		expect(lineOf(row.minimum, 'Drift over life')?.value).toBeCloseTo(raw * 0.995, 9);
		expect(lineOf(row.minimum, 'Systematic uncertainty')?.value).toBeCloseTo(
			raw * 0.995 * 0.997,
			9
		);
		const above = (row.maximum?.raw ?? 0) * 1e12;
		expect(lineOf(row.maximum, 'Systematic uncertainty')?.value).toBeCloseTo(
			above * 1.005 * 1.003,
			9
		);
	});
});

/** Redoes a minimum or maximum from the texts of its derivation alone, and gives its digits. */
function redone(
	value: LimitValue,
	side: 'minimum' | 'maximum',
	rules: LimitPolicy & { drift: number }
): string[] {
	const line = (name: string) => readDigits(lineOf(value, name)?.text ?? '');
	const sign = side === 'minimum' ? -1 : 1;
	const raw = Math.exp(line('Mean of ln C') + sign * line('Factor k₁') * line('Spread of ln C'));
	const direction = side === 'minimum' ? 'down' : 'up';
	return [
		...[raw, line(`Raw ${side}`)].map((from) => from * (1 + sign * rules.drift) * (1 + sign * U)),
		line('Systematic uncertainty')
	].map((outwards) => roundOutward(outwards, direction, rules.resolution).text);
}

const U = 0.002;
const population = fc
	.array(
		fc.array(fc.double({ min: -0.1, max: 0.1, noNaN: true }), { minLength: 3, maxLength: 12 }),
		{ minLength: 2, maxLength: 5 }
	)
	.chain((lots) =>
		fc
			.double({ min: 0.05, max: 900, noNaN: true })
			.map((median) => lots.map((lot) => lot.map((y) => median * Math.exp(y))))
	);
const policy = fc.record({
	content: fc.double({ min: 0.9, max: 0.9999, noNaN: true }),
	confidence: fc.double({ min: 0.5, max: 0.99, noNaN: true }),
	drift: fc.constantFrom(0, 0.005, 0.02),
	resolution: fc.constantFrom(
		{ significantFigures: 3 },
		{ significantFigures: 2 },
		{ significantFigures: 4 }
	)
});

const isPromised = (
	row: LimitRow
): row is LimitRow & { minimum: LimitValue; maximum: LimitValue } =>
	row.minimum !== null && row.maximum !== null;

describe('whatever the devices and the policy', () => {
	it('printed lies outwards of raw, and min ≤ typ ≤ max', () => {
		fc.assert(
			fc.property(population, policy, (lots, rules) => {
				const row = rowBy(rules, withValues(lots, { uncertainty: U }));
				fc.pre(isPromised(row));
				expect(row.minimum.printed).toBeLessThanOrEqual(row.minimum.raw);
				expect(row.maximum.printed).toBeGreaterThanOrEqual(row.maximum.raw);
				expect(row.minimum.printed).toBeLessThanOrEqual(row.typical?.printed ?? Number.NaN);
				expect(row.maximum.printed).toBeGreaterThanOrEqual(row.typical?.printed ?? Number.NaN);
			})
		);
	});

	it('more content or confidence never tightens a limit', () => {
		fc.assert(
			fc.property(population, policy, policy, (lots, one, other) => {
				const weak = {
					content: Math.min(one.content, other.content),
					confidence: Math.min(one.confidence, other.confidence)
				};
				const strong = {
					content: Math.max(one.content, other.content),
					confidence: Math.max(one.confidence, other.confidence)
				};
				const [loose, tight] = [strong, weak].map((rules) => rowBy(rules, withValues(lots)));
				fc.pre(loose !== undefined && tight !== undefined && isPromised(tight));
				expect(loose.minimum?.raw).toBeLessThanOrEqual(tight.minimum.raw);
				expect(loose.maximum?.raw).toBeGreaterThanOrEqual(tight.maximum.raw);
			})
		);
	});

	it('scaling the capacitance scales the limits', () => {
		fc.assert(
			fc.property(population, fc.double({ min: 0.1, max: 10, noNaN: true }), (lots, scale) => {
				const [row, scaled] = [lots, lots.map((lot) => lot.map((C) => C * scale))].map((of) =>
					rowBy({}, withValues(of))
				);
				fc.pre(row !== undefined && scaled !== undefined && isPromised(row) && isPromised(scaled));
				expect(scaled.minimum.raw / row.minimum.raw).toBeCloseTo(scale, 9);
				expect(scaled.maximum.raw / row.maximum.raw).toBeCloseTo(scale, 9);
			})
		);
	});

	it('the order of the lots and of their devices changes nothing', () => {
		fc.assert(
			fc.property(population, (lots) => {
				const turned = lots.map((lot) => lot.toReversed());
				expect(rowBy({}, withValues(turned))).toEqual(rowBy({}, withValues(lots)));
				const ends = rowBy({}, withValues(lots.toReversed()));
				const row = rowBy({}, withValues(lots));
				expect(ends.minimum?.text).toBe(row.minimum?.text);
				expect(ends.maximum?.text).toBe(row.maximum?.text);
			})
		);
	});

	it('a reader can redo the printed limits from the derivation', () => {
		fc.assert(
			fc.property(population, policy, (lots, rules) => {
				const distribution = withValues(lots, { uncertainty: U });
				// Without spread a limit lies on a step exactly, where no rounded logarithm reaches it.
				fc.pre(distribution.standardDeviation > 1e-9);
				const all = { ...PLAIN_POLICY, ...rules };
				const row = rowBy(all, distribution);
				fc.pre(isPromised(row));
				const { minimum, maximum } = row;
				expect(redone(minimum, 'minimum', all)).toEqual(Array(3).fill(minimum.text));
				expect(redone(maximum, 'maximum', all)).toEqual(Array(3).fill(maximum.text));
			})
		);
	});
});
