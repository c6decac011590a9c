import { describe, expect, it } from 'vitest';
import { lotDesign } from '../../limits/lotDesign';
import { lotsToleranceHalfWidth, lotsToleranceMargin } from '../../stats/lotsToleranceMargin';
import { normalQuantile } from '../../stats/normalQuantile';
import { meeOwenMargin } from '../../stats/meeOwen';
import { computeDistribution } from '../../distributions/computeDistribution';
import { chiSquareBeyond } from './chiSquareBeyond';
import { lotsHalfWidth, lotsMargin } from './lotsMargin';
import { lotSpread, type LotSpread } from './lotSpread';
import { oneSidedFactor } from './oneSidedFactor';
import { twoSidedFactor } from './twoSidedFactor';

type Lots = readonly (readonly (readonly number[])[])[];

const PROMISE = { content: 0.99, confidence: 0.975 };

/** Lots of wafers of values, by the second route and by the first. */
function bothRoutes(lots: Lots) {
	const devices = lots.flatMap((wafers, lot) =>
		wafers.flatMap((values, wafer) =>
			values.map((y) => ({ waferLot: `${lot}`, wafer: `${wafer}`, y }))
		)
	);
	const spread = lotSpread(devices);
	const groups = lots.flatMap((wafers, lot) =>
		wafers.map((_, wafer) => ({ lot: `${lot}`, waferLot: `${lot}`, wafer: `${wafer}` }))
	);
	const distribution = computeDistribution({
		characteristic: 'x',
		conditionKey: 'T=25',
		unit: '',
		transform: 'identity',
		values: Float64Array.from(devices, ({ y }) => y),
		groupOf: Int32Array.from(devices, ({ waferLot, wafer }) =>
			groups.findIndex((of) => of.waferLot === waferLot && of.wafer === wafer)
		),
		groups,
		sets: [],
		uncertainty: null,
		excluded: 0,
		quarantined: 0
	});
	const design = distribution && lotDesign(distribution);
	if (spread === undefined || design === undefined) throw new Error('lots of several devices');
	return { spread, strata: design.strata };
}

/** A wafer of normal scores about a centre, so that its spread is what it is said to be. */
const wafer = (centre: number, spread: number, devices: number) =>
	Array.from({ length: devices }, (_, j) => centre + spread * normalQuantile((j + 0.5) / devices));

/** Lots and wafers off by turns, as far as said. */
function design(lots: number, wafers: number, { ofLots = 1, ofWafers = 1, devices = 20 }) {
	const turn = (index: number) => ((index * 7) % 5) / 2 - 1;
	return Array.from({ length: lots }, (_, lot) =>
		Array.from({ length: wafers }, (__, of) =>
			wafer(ofLots * turn(lot) + ofWafers * turn(lot + 3 * of + 1), 1, devices)
		)
	);
}

describe('limits for future lots', () => {
	it.each([
		['one wafer a lot', design(3, 1, {})],
		['many lots', design(12, 1, { devices: 4 })],
		['nested', design(4, 4, {})],
		['lots alike', design(5, 4, { ofLots: 0.1 })],
		['unequal lots', [...design(3, 4, {}), ...design(2, 3, { devices: 7 })]]
	])('agree with the first route: %s', (_, lots) => {
		const { spread, strata } = bothRoutes(lots);
		expect(spread.mean).toBeCloseTo(strata.mean, 10);
		const margins = [lotsMargin(spread, PROMISE), lotsToleranceMargin(strata, PROMISE)];
		expect(Math.abs((margins[0] ?? 0) / (margins[1] ?? 1) - 1)).toBeLessThan(2e-5);
		const halves = [lotsHalfWidth(spread, PROMISE), lotsToleranceHalfWidth(strata, PROMISE)];
		expect(Math.abs((halves[0] ?? 0) / (halves[1] ?? 1) - 1)).toBeLessThan(1e-4);
	});

	// SciPy 1.10.1: the triple integral over 600 · 300 nodes with chi2.sf innermost, solved by brentq
	it('hold for a single degree of freedom between wafers', () => {
		const level = (squares: number, degrees: number, share: number) => ({
			squares,
			degrees,
			share
		});
		const spread: LotSpread = {
			mean: 0,
			lots: 3,
			levels: [level(2.25e-6, 2, 1), level(6.75e-6, 1, 1 / 6), level(2.7e-5, 4, 0.5)]
		};
		expect(lotsMargin(spread, PROMISE)).toBeCloseTo(0.082418, 5);
		expect(lotsHalfWidth(spread, PROMISE)).toBeCloseTo(0.092106, 4);
	});

	it('lie near the closed form of Mee and Owen for lots and devices', () => {
		const { spread, strata } = bothRoutes([
			[[1, 2, 3, 4]],
			[[3, 4, 5, 6]],
			[[2, 3, 4, 5]],
			[[0, 2, 3]]
		]);
		const closed = meeOwenMargin(strata, { content: 0.99, confidence: 0.95 });
		const integrated = lotsMargin(spread, { content: 0.99, confidence: 0.95 });
		expect(Math.abs(integrated / closed - 1)).toBeLessThan(0.05);
	});

	it('are nothing when nothing varies', () => {
		const level = { squares: 0, degrees: 3, share: 1 };
		const still: LotSpread = { mean: 2, lots: 4, levels: [level, { ...level, degrees: 12 }] };
		expect(lotsMargin(still, PROMISE)).toBe(0);
		expect(lotsHalfWidth(still, PROMISE)).toBe(0);
	});
});

// R 4.2.2: pchisq(x, df, lower.tail = FALSE)
it.each([
	[3, 1, 0.08326451666355042],
	[3, 2, 0.22313016014842982],
	[7.5, 5, 0.18602983360286701],
	[30, 22, 0.11846441152901],
	[1100, 1000, 0.0146144081262952]
])('χ² beyond %f with %i degrees of freedom', (x, freedom, probability) => {
	expect(chiSquareBeyond(x, freedom)).toBeCloseTo(probability, 8);
});

// Odeh and Owen 1980, as quoted by the reference rows: n = 30, content and confidence 0.95
it('finds the two-sided factor 2.5549 of 30 devices', () => {
	expect(twoSidedFactor(30, { content: 0.95, confidence: 0.95 })).toBeCloseTo(2.55489281, 7);
	expect(twoSidedFactor(30, { content: 0.95, confidence: 0.95 })).toBeGreaterThan(
		oneSidedFactor(30, { content: 0.95, confidence: 0.95 })
	);
});
