import { expect, it } from 'vitest';
import { mapNumbers } from './mapNumbers';

it('changes each number and leaves the given ones alone', () => {
	const values = Float64Array.of(1, 4, Number.NaN, 9);
	expect([...mapNumbers(values, Math.sqrt)]).toEqual([1, 2, Number.NaN, 3]);
	expect([...mapNumbers(values, (value, i) => i)]).toEqual([0, 1, 2, 3]);
	expect([...values]).toEqual([1, 4, Number.NaN, 9]);
});
