import { expect, it } from 'vitest';
import { SampleTooSmallError, TooFewLotsError } from './errors';
import { groupSums } from './groupSums';
import { nestedStrata, oneWayStrata } from './lotStrata';
import { lotComponents, nestedComponents } from './varianceComponents';

// NumPy: variance of the lot means, harmonic mean of 5, 2 and 4
it('weighs every lot alike, with the harmonic mean of their sizes', () => {
	const strata = oneWayStrata([
		groupSums([3.1, 2.9, 3.4, 2.7, 2.8]),
		groupSums([4.0, 4.4]),
		groupSums([2.2, 2.6, 3.0, 3.3])
	]);
	expect(strata.mean).toBeCloseTo(3.318333333333334, 14);
	expect(strata.effectiveSize).toBeCloseTo(3.1578947368421053, 14);
	expect(strata.strata[0]?.variance).toBeCloseTo(0.5935083333333332, 14);
	expect(strata.strata[1]?.share).toBeCloseTo(1 - 1 / 3.1578947368421053, 14);
});

// NumPy: quadratic forms written as matrices, shares from the traces of their expectations
it('has unbiased shares in an unbalanced nested design', () => {
	const strata = nestedStrata([
		[groupSums([3.1, 2.9, 3.4]), groupSums([2.7, 2.8])],
		[groupSums([4.0, 4.4, 3.9, 4.1]), groupSums([3.6]), groupSums([4.2, 4.5])],
		[groupSums([2.2, 2.6]), groupSums([3.0, 3.3, 2.9])]
	]);
	expect(strata.mean).toBeCloseTo(3.230555555555555, 13);
	expect(strata.strata[0]?.variance).toBeCloseTo(0.4743287037037034, 13);
	expect(strata.strata[1]?.variance).toBeCloseTo(0.14684027777777747, 13);
	expect(strata.strata[1]?.share).toBeCloseTo(0.5555555555555557, 13);
	expect(strata.strata[2]?.share).toBeCloseTo(0.5185185185185184, 13);
	expect(strata.strata.map(({ degrees }) => degrees)).toEqual([2, 4, 10]);
});

it('adds up to the total of the components when balanced', () => {
	const lots = [
		[
			[1.0, 1.4],
			[2.1, 2.2]
		],
		[
			[3.3, 3.0],
			[4.1, 4.4]
		],
		[
			[0.2, 0.9],
			[1.7, 1.6]
		]
	].map((lot) => lot.map(groupSums));
	const { strata } = nestedStrata(lots);
	const total = strata.reduce((sum, { variance, share }) => sum + variance * share, 0);
	expect(total).toBeCloseTo(nestedComponents(lots).total, 13);
	const flat = lots.map((lot) => lot[0]!);
	const oneWay = oneWayStrata(flat).strata;
	const oneWayTotal = oneWay.reduce((sum, { variance, share }) => sum + variance * share, 0);
	expect(oneWayTotal).toBeCloseTo(lotComponents(flat).total, 13);
});

it('refuses what cannot carry a limit for future lots', () => {
	expect(() => oneWayStrata([groupSums([1, 2])])).toThrow(TooFewLotsError);
	expect(() => oneWayStrata([groupSums([1]), groupSums([2])])).toThrow(SampleTooSmallError);
	expect(() => nestedStrata([[groupSums([1, 2])]])).toThrow(TooFewLotsError);
	expect(() => nestedStrata([[groupSums([1, 2])], [groupSums([2, 3])]])).toThrow(
		SampleTooSmallError
	);
	expect(() => nestedStrata([[groupSums([1]), groupSums([2])], [groupSums([2])]])).toThrow(
		SampleTooSmallError
	);
});
