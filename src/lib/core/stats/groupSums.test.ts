import { expect, it } from 'vitest';
import { SampleTooSmallError } from './errors';
import { groupSums } from './groupSums';

it('sums up a group', () => {
	expect(groupSums([1, 2, 6])).toEqual({ sampleSize: 3, mean: 3, sumOfSquares: 14 });
	expect(groupSums([4.25])).toEqual({ sampleSize: 1, mean: 4.25, sumOfSquares: 0 });
	expect(() => groupSums([])).toThrow(SampleTooSmallError);
});
