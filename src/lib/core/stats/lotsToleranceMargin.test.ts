import fc from 'fast-check';
import { expect, it } from 'vitest';
import { chiSquareQuantile } from './chiSquare';
import { OutsideDomainError } from './errors';
import { groupSums } from './groupSums';
import { nestedStrata, oneWayStrata } from './lotStrata';
import {
	lotsHalfWidthConfidence,
	lotsMarginConfidence,
	lotsToleranceHalfWidth,
	lotsToleranceMargin
} from './lotsToleranceMargin';
import { normalQuantile } from './normalQuantile';

const NESTED = nestedStrata([
	[groupSums([3.1, 2.9, 3.4]), groupSums([2.7, 2.8])],
	[groupSums([4.0, 4.4, 3.9, 4.1]), groupSums([3.6]), groupSums([4.2, 4.5])],
	[groupSums([2.2, 2.6]), groupSums([3.0, 3.3, 2.9])]
]);

// The worked case of the design: 3 lots of 25, P = 0.99, 95 % shared between both sides
it('puts the worked case at 12.233 and 18.391 pF', () => {
	const lots = [14.8, 15.0, 15.2].map((middle) =>
		groupSums(
			Array.from(
				{ length: 25 },
				(_, j) => Math.log(middle) + 0.015 * normalQuantile((j + 0.5) / 25)
			)
		)
	);
	const strata = oneWayStrata(lots);
	const margin = lotsToleranceMargin(strata, { content: 0.99, confidence: 0.975 });
	expect(Math.exp(strata.mean - margin)).toBeCloseTo(12.233, 3);
	expect(Math.exp(strata.mean + margin)).toBeCloseTo(18.391, 3);
});

// NumPy: 4 million draws of the pivotal quantity, seed 5; its quantiles are good to 0.3 %
it('agrees with a simulation of the pivotal quantity, lots and wafers unbalanced', () => {
	const content = 0.95;
	const oneSided = (confidence: number) => lotsToleranceMargin(NESTED, { content, confidence });
	const twoSided = (confidence: number) => lotsToleranceHalfWidth(NESTED, { content, confidence });
	expect(oneSided(0.9) / 3.75721302).toBeCloseTo(1, 2);
	expect(oneSided(0.95) / 5.33960191).toBeCloseTo(1, 2);
	expect(twoSided(0.9) / 4.89052287).toBeCloseTo(1, 2);
	expect(twoSided(0.95) / 6.94904381).toBeCloseTo(1, 2);
});

// With alike lot means only the devices are left: z √(share · SS / χ²)
it('comes down to the spread of devices when lot means do not differ at all', () => {
	const strata = {
		mean: 0,
		lots: 3,
		effectiveSize: 25,
		strata: [
			{ variance: 0, degrees: 2, share: 1 },
			{ variance: 2e-4, degrees: 72, share: 0.96 }
		]
	};
	const promise = { content: 0.99, confidence: 0.975 };
	const spread = Math.sqrt((0.96 * 2e-4 * 72) / chiSquareQuantile(0.025, 72));
	expect(lotsToleranceMargin(strata, promise) / (normalQuantile(0.99) * spread)).toBeCloseTo(1, 2);
	expect(lotsToleranceHalfWidth(strata, promise) / (normalQuantile(0.995) * spread)).toBeCloseTo(
		1,
		2
	);
});

it('is zero when nothing varies', () => {
	const still = oneWayStrata([groupSums([1, 1]), groupSums([1, 1]), groupSums([1, 1])]);
	expect(lotsToleranceMargin(still, { content: 0.9, confidence: 0.9 })).toBe(0);
	expect(lotsToleranceHalfWidth(still, { content: 0.9, confidence: 0.9 })).toBe(0);
});

it('never tightens with more content or confidence, and scales with the data', () => {
	const variance = fc.double({ min: 1e-6, max: 1, noNaN: true });
	const share = fc.double({ min: 0.6, max: 0.999, noNaN: true });
	const lots = fc.integer({ min: 3, max: 12 });
	fc.assert(
		fc.property(lots, variance, variance, share, share, share, (a, v1, v2, p, g, more) => {
			const design = (scale: number) => ({
				mean: 0,
				lots: a,
				effectiveSize: 10,
				strata: [
					{ variance: v1 * scale, degrees: a - 1, share: 1 },
					{ variance: v2 * scale, degrees: 9 * a, share: 0.9 }
				]
			});
			const margin = lotsToleranceMargin(design(1), { content: p, confidence: g });
			const moreContent = Math.max(p, more);
			const moreConfidence = Math.max(g, more);
			const close = 1 - 1e-6;
			expect(
				lotsToleranceMargin(design(1), { content: moreContent, confidence: g })
			).toBeGreaterThanOrEqual(margin * close);
			expect(
				lotsToleranceMargin(design(1), { content: p, confidence: moreConfidence })
			).toBeGreaterThanOrEqual(margin * close);
			expect(
				lotsToleranceMargin(design(4), { content: p, confidence: g }) / (2 * margin)
			).toBeCloseTo(1, 6);
		}),
		{ numRuns: 25 }
	);
});

const nestedDesign = (lots: number, ofLots: number, ofWafers: number, ofDevices: number) => ({
	mean: 0,
	lots,
	effectiveSize: 8,
	strata: [
		{ variance: ofLots, degrees: lots - 1, share: 1 },
		{ variance: ofWafers, degrees: 2 * lots, share: 2 / 3 },
		{ variance: ofDevices, degrees: 21 * lots, share: 7 / 8 }
	]
});

// A quadrature of another order, over Z and the lots with a chi-square tail of the devices
// innermost, spacing 0.05 (scratch script, TypeScript): both agree to 2e-6 in the confidence
it.each([
	[1 / 25, 0.99, 0.975, 3.88338307],
	[1, 0.9, 0.9, 4.498142],
	[5e-4, 0.9, 0.9, 1.41701662],
	[1e-6, 0.99, 0.975, 2.7236196]
])(
	'has the margin of a fine quadrature for lots of variance %d',
	(variance, content, confidence, margin) => {
		const strata = {
			mean: 0,
			lots: 3,
			effectiveSize: 25,
			strata: [
				{ variance, degrees: 2, share: 1 },
				{ variance: 1, degrees: 72, share: 0.96 }
			]
		};
		expect(lotsToleranceMargin(strata, { content, confidence }) / margin).toBeCloseTo(1, 3);
	}
);

// A margin that solves anything else misses the sixth digit in nearly every run, so twenty are enough;
// a third of the variances drawn is 0 and a third out of scale, and those are the slow ones
it('keeps just the confidence asked for, also far out', () => {
	const variance = fc.oneof(
		fc.constant(0),
		fc.double({ min: 1e-6, max: 1, noNaN: true }),
		fc.constantFrom(1e-9, 1e4)
	);
	const content = fc.constantFrom(0.8, 0.9, 0.99, 0.9999, 0.999999);
	const confidence = fc.constantFrom(0.5, 0.9, 0.95, 0.975, 0.999);
	fc.assert(
		fc.property(
			fc.integer({ min: 3, max: 15 }),
			variance,
			variance,
			content,
			confidence,
			(lots, ofLots, ofWafers, content, confidence) => {
				const strata = nestedDesign(lots, ofLots, ofWafers, 1);
				const margin = lotsToleranceMargin(strata, { content, confidence });
				const halfWidth = lotsToleranceHalfWidth(strata, { content, confidence });
				const confidenceOf = lotsMarginConfidence(strata, content);
				expect(confidenceOf(margin)).toBeCloseTo(confidence, 6);
				expect(lotsHalfWidthConfidence(strata, content)(halfWidth)).toBeCloseTo(confidence, 6);
				expect(confidenceOf(margin * 1.01)).toBeGreaterThan(confidenceOf(margin * 0.99));
			}
		),
		{ numRuns: 20 }
	);
});

it('refuses a certainty, and a design without devices below the lots', () => {
	expect(() => lotsToleranceMargin(NESTED, { content: 1, confidence: 0.9 })).toThrow(
		OutsideDomainError
	);
	expect(() => lotsToleranceHalfWidth(NESTED, { content: 0.9, confidence: 0 })).toThrow(
		OutsideDomainError
	);
	const bare = { ...NESTED, strata: NESTED.strata.slice(0, 1) };
	expect(() => lotsToleranceMargin(bare, { content: 0.9, confidence: 0.9 })).toThrow(
		'at least 2 strata, got 1'
	);
});
