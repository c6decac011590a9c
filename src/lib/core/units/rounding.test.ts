import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { roundInward, roundNearest, roundOutward } from './rounding';

describe('roundOutward', () => {
	// By hand; the first two are where floor(value / step) in binary loses a step.
	it.each([
		[0.7, 'down', { step: 0.1 }, 0.7, '0.7'],
		[2.3, 'down', { step: 0.1 }, 2.3, '2.3'],
		[2.3, 'up', { step: 0.1 }, 2.3, '2.3'],
		[1.1, 'up', { step: 0.1 }, 1.1, '1.1'],
		[12.58, 'down', { significantFigures: 3 }, 12.5, '12.5'],
		[12.51, 'up', { significantFigures: 3 }, 12.6, '12.6'],
		[12.5, 'up', { significantFigures: 3 }, 12.5, '12.5'],
		[9.996, 'up', { significantFigures: 3 }, 10, '10.0'],
		[9.996, 'down', { significantFigures: 3 }, 9.99, '9.99'],
		[0.099951, 'up', { significantFigures: 3 }, 0.1, '0.100'],
		[1234, 'down', { significantFigures: 2 }, 1200, '1200'],
		[1.26, 'up', { step: 0.25 }, 1.5, '1.50'],
		[7, 'up', { step: 5 }, 10, '10'],
		[3, 'down', { step: 0.01 }, 3, '3.00'],
		[-1.26, 'down', { step: 0.1 }, -1.3, '\u22121.3'],
		[-1.26, 'up', { step: 0.1 }, -1.2, '\u22121.2'],
		[-0.04, 'up', { step: 0.1 }, 0, '0.0'],
		[0, 'down', { significantFigures: 3 }, 0, '0'],
		[1e-7, 'up', { step: 1e-8 }, 1e-7, '0.00000010'],
		[1e22, 'up', { significantFigures: 3 }, 1e22, '10000000000000000000000']
	] as const)('%d %s to %o is %d', (value, direction, to, expected, text) => {
		expect(roundOutward(value, direction, to)).toEqual({ value: expected, text });
	});

	it('never lands inside, moves less than a step, and leaves a multiple where it is', () => {
		const steps = fc.constantFrom(0.001, 0.01, 0.05, 0.1, 0.25, 1, 5);
		fc.assert(
			fc.property(fc.double({ min: -1e4, max: 1e4, noNaN: true }), steps, (value, step) => {
				const down = roundOutward(value, 'down', { step }).value;
				const up = roundOutward(value, 'up', { step }).value;
				expect(down).toBeLessThanOrEqual(value);
				expect(up).toBeGreaterThanOrEqual(value);
				expect(value - down).toBeLessThan(step * (1 + 1e-9));
				expect(up - value).toBeLessThan(step * (1 + 1e-9));
				expect(roundOutward(down, 'down', { step }).value).toBe(down);
				expect(roundOutward(down, 'up', { step }).value).toBe(down);
			})
		);
	});

	it('keeps every multiple of a tenth up to a thousand', () => {
		for (let tenths = 0; tenths <= 10_000; tenths++) {
			const value = Number(`${tenths}e-1`);
			expect(roundOutward(value, 'down', { step: 0.1 }).value).toBe(value);
			expect(roundOutward(value, 'up', { step: 0.1 }).value).toBe(value);
		}
	});

	it.each([Number.NaN, Infinity])('refuses %d', (value) => {
		expect(() => roundOutward(value, 'up', { step: 0.1 })).toThrow(RangeError);
	});

	it.each([{ step: 0 }, { step: -1 }, { significantFigures: 0 }, { significantFigures: 1.5 }])(
		'refuses to round to %o',
		(to) => {
			expect(() => roundOutward(1, 'up', to)).toThrow(RangeError);
		}
	);
});

describe('roundInward', () => {
	it.each([
		['minimum', 12.41, 12.5],
		['maximum', 12.49, 12.4],
		['minimum', 2.3, 2.3],
		['maximum', 2.3, 2.3]
	] as const)('a %s of %d becomes %d', (limit, value, expected) => {
		expect(roundInward(value, limit, { step: 0.1 }).value).toBe(expected);
	});
});

describe('roundNearest', () => {
	// By hand; 1.005 and 2.675 are where a binary product rounds the half down.
	it.each([
		[1.005, { step: 0.01 }, 1.01, '1.01'],
		[2.675, { step: 0.01 }, 2.68, '2.68'],
		[-1.005, { step: 0.01 }, -1.01, '\u22121.01'],
		[1.0049, { step: 0.01 }, 1, '1.00'],
		[13.849, { significantFigures: 3 }, 13.8, '13.8'],
		[13.85, { significantFigures: 3 }, 13.9, '13.9']
	] as const)('%d to %o is %d', (value, to, expected, text) => {
		expect(roundNearest(value, to)).toEqual({ value: expected, text });
	});
});
