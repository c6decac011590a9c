import fc from 'fast-check';
import { expect, it } from 'vitest';
import { SampleTooSmallError } from './errors';
import { quantile } from './quantile';
import { selectQuantile } from './selectQuantile';

it('is the quantile of the sorted values', () => {
	const values = fc.array(fc.double({ min: -5, max: 5, noNaN: true }), { minLength: 1 });
	const repeated = fc.array(fc.integer({ min: 0, max: 3 }), { minLength: 1 });
	fc.assert(
		fc.property(
			fc.oneof(values, repeated),
			fc.double({ min: 0, max: 1, noNaN: true }),
			(list, probability) => {
				const sorted = Float64Array.from(list).sort();
				expect(selectQuantile(Float64Array.from(list), probability)).toBeCloseTo(
					quantile(sorted, probability),
					12
				);
			}
		)
	);
});

it('keeps the values it was given', () => {
	const values = Float64Array.of(3, 1, 2, 5, 4);
	selectQuantile(values, 0.5);
	expect([...values].toSorted((a, b) => a - b)).toEqual([1, 2, 3, 4, 5]);
});

it('refuses no values', () => {
	expect(() => selectQuantile(new Float64Array(), 0.5)).toThrow(SampleTooSmallError);
});
