import { expect, it } from 'vitest';
import { groupBy } from './groupBy';

it('keeps the order of keys and of items', () => {
	expect([...groupBy([3, 1, 4, 1, 5, 9, 2, 6], (item) => item % 3)]).toEqual([
		[0, [3, 9, 6]],
		[1, [1, 4, 1]],
		[2, [5, 2]]
	]);
	expect(groupBy([], String).size).toBe(0);
});
