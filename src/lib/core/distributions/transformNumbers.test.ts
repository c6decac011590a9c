import { expect, it } from 'vitest';
import { transform } from './summary';
import { transformNumbers } from './transformNumbers';
import { TRANSFORMS } from './transforms';

it.each(transform.options)(
	'transforms each value as %s does one, and leaves the given ones',
	(name) => {
		const values = Float64Array.of(2e-12, 0.5, 1, 100, 12_345.678);
		const given = [...values];
		expect([...transformNumbers(values, name)]).toEqual(given.map(TRANSFORMS[name].apply));
		expect([...values]).toEqual(given);
	}
);
