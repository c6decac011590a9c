import { expect, it } from 'vitest';
import { threeSmallLots, withValues } from './limitTestData';
import { lotTest } from './lotTest';

// R 4.2.2: anova(lm(y ~ lot)) on the twelve values of threeSmallLots, y their logarithms
it('has the F and p that R finds', () => {
	const found = lotTest(threeSmallLots());
	expect(found).toMatchObject({ lots: 3, betweenDegrees: 2, withinDegrees: 9 });
	// sqrt of the mean squares' combination: effective lot size (12 − 50/12)/2
	expect(found?.spreadWithin).toBeCloseTo(Math.sqrt(0.0001177040163004), 12);
	expect(found?.spreadBetween).toBeCloseTo(
		Math.sqrt((0.001119866534416 - 0.0001177040163004) / ((12 - 50 / 12) / 2)),
		12
	);
	expect(found?.F).toBeCloseTo(9.51425932278709, 9);
	expect(found?.p).toBeCloseTo(0.0060240787311714, 12);
});

it('takes wafers of one wafer lot together', () => {
	const distribution = threeSmallLots();
	const groups = distribution.groups.map((of) => ({
		...of,
		waferLot: of.lot === 'C' ? 'C' : 'AB'
	}));
	expect(lotTest({ ...distribution, groups })).toMatchObject({ lots: 2, withinDegrees: 10 });
});

it('says nothing about a single lot', () => {
	expect(lotTest(withValues([[14, 15, 16]]))).toBeUndefined();
});

it('says nothing about one device a lot', () => {
	expect(lotTest(withValues([[14], [15], [16]]))).toBeUndefined();
});

it('is certain where lots differ and their devices do not', () => {
	expect(
		lotTest(
			withValues([
				[1, 1],
				[2, 2]
			])
		)
	).toMatchObject({ F: Infinity, p: 0 });
});
