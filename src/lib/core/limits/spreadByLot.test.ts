import { expect, it } from 'vitest';
import { threeSmallLots, withValues } from './limitTestData';
import { spreadByLot } from './spreadByLot';

// R 4.2.2: exp(tapply(log(x), lot, mean)); median 14.905; within sqrt(1.177040163004e-4)
it('gives range, centre and deviation of each lot in the unit asked for', () => {
	const { lots, withinPercent } = spreadByLot(threeSmallLots(), 1e-12);
	expect(lots.map(({ name, sampleSize }) => [name, sampleSize])).toEqual([
		['A', 4],
		['B', 3],
		['C', 5]
	]);
	expect(lots[0]?.lowest).toBeCloseTo(14.71, 9);
	expect(lots[0]?.highest).toBeCloseTo(15.02, 9);
	expect(lots[1]?.centre).toBeCloseTo(Math.exp(2.72389246399181), 9);
	expect(lots[1]?.deviationPercent).toBeCloseTo((Math.exp(2.72389246399181) / 14.905 - 1) * 100, 9);
	expect(withinPercent).toBeCloseTo(1.084915, 5);
});

it('takes wafer lots for lots', () => {
	const distribution = threeSmallLots();
	const groups = distribution.groups.map((of) => ({
		...of,
		waferLot: of.lot === 'B' ? 'A' : of.lot
	}));
	const { lots } = spreadByLot({ ...distribution, groups }, 1e-12);
	expect(lots.map(({ name, sampleSize }) => [name, sampleSize])).toEqual([
		['A', 7],
		['C', 5]
	]);
	expect(lots[0]?.highest).toBeCloseTo(15.4, 9);
});

it('has no components for a single lot', () => {
	const spread = spreadByLot(withValues([[14, 15, 16]]), 1e-12);
	expect([spread.betweenPercent, spread.withinPercent]).toEqual([null, null]);
});
