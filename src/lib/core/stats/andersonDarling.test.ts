import { expect, it } from 'vitest';
import { andersonDarling, andersonDarlingPValue, residualsWithinLots } from './andersonDarling';
import { OutsideDomainError, SampleTooSmallError } from './errors';

// R 4.2.2 nortest: ad.test(PlantGrowth$weight)
it('matches R', () => {
	const weights = [
		4.17, 5.58, 5.18, 6.11, 4.5, 4.61, 5.17, 4.53, 5.33, 5.14, 4.81, 4.17, 4.41, 3.59, 5.87, 3.83,
		6.03, 4.89, 4.32, 4.69, 6.31, 5.12, 5.54, 5.5, 5.37, 5.29, 4.92, 6.15, 5.8, 5.26
	];
	const { statistic, pValue } = andersonDarling(weights);
	expect(statistic).toBeCloseTo(0.150660486, 8);
	expect(pValue).toBeCloseTo(0.956745873, 6);
});

it('falls with the statistic, across all pieces of the approximation', () => {
	let previous = 1;
	for (let a = 0.1; a < 11; a += 0.05) {
		const p = andersonDarlingPValue(a);
		expect(p).toBeLessThanOrEqual(previous + 1e-3);
		previous = p;
	}
});

it('takes residuals about each lot, as wide as the devices', () => {
	const residuals = residualsWithinLots([[1, 3], [10, 20, 30], [7]]);
	expect(residuals).toHaveLength(5);
	expect(residuals[0]).toBeCloseTo(-Math.SQRT2, 14);
	expect(residuals[4]).toBeCloseTo(10 * Math.sqrt(1.5), 13);
});

it('refuses seven values, and values without spread', () => {
	expect(() => andersonDarling([1, 2, 3, 4, 5, 6, 7])).toThrow(SampleTooSmallError);
	expect(() => andersonDarling([1, 1, 1, 1, 1, 1, 1, 1])).toThrow(OutsideDomainError);
});
