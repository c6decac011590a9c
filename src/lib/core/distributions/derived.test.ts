import { describe, expect, it } from 'vitest';
import { derivedCharge } from './derivedCharge';
import { derivedCoefficient } from './derivedCoefficient';
import { derivedQuality } from './derivedQuality';
import { derivedRatio } from './derivedRatio';

const column = (bias: number, values: readonly number[], sets = [1]) => ({
	bias,
	values: Float64Array.from(values),
	sets
});

describe('a ratio', () => {
	it('is that of one device, and absent where it lacks a bias', () => {
		const found = derivedRatio(
			column(1, [15e-12, 16e-12, NaN, 15e-12], [2]),
			column(28, [2e-12, 2e-12, 2e-12, NaN], [1, 2])
		);
		expect([...found.values]).toEqual([7.5, 8, NaN, NaN]);
		expect(found.sets).toEqual([1, 2]);
	});
});

describe('charge and energy', () => {
	// The power Schottky of the worked cases: 5 pF + 500 pF (1 + V/1.25)^−½. In closed form to 400 V
	// Q = 5e-12·400 + 500e-12·2·1.25·(√321 − 1) = 23.146 nC, and
	// E = 5e-12·400²/2 + 500e-12·1.25²·[(2/3)(321^1.5 − 1) − 2(√321 − 1)] = 3.3682 µJ.
	const law = (bias: number) => 5e-12 + 500e-12 / Math.sqrt(1 + bias / 1.25);
	const biases = [0, 0.5, 1, 2, 5, 10, 20, 50, 100, 200, 400];
	const columns = biases.map((bias) => column(bias, [law(bias), 1.1 * law(bias), law(bias)]));

	it('come out for each device as in closed form', () => {
		const [at400] = derivedCharge(columns, [400, 300]);
		const root = Math.sqrt(321);
		const charge = 5e-12 * 400 + 500e-12 * 2 * 1.25 * (root - 1);
		const energy =
			(5e-12 * 400 ** 2) / 2 + 500e-12 * 1.25 ** 2 * ((2 / 3) * (root ** 3 - 1) - 2 * (root - 1));
		expect(at400?.bias).toBe(400);
		expect(charge).toBeCloseTo(23.146e-9, 11);
		for (const [device, factor] of [1, 1.1, 1].entries()) {
			expect((at400?.charge.values[device] ?? 0) / (factor * charge)).toBeCloseTo(1, 7);
			expect((at400?.energy.values[device] ?? 0) / (factor * energy)).toBeCloseTo(1, 7);
		}
	});

	it('are not given to a bias nobody measured, nor without 0 V', () => {
		expect(derivedCharge(columns, [300])).toEqual([]);
		expect(derivedCharge(columns.slice(1), [400])).toEqual([]);
		const lacking = columns.map(({ bias, values }) =>
			column(bias, bias === 0 ? [NaN, values[1] ?? 0, values[2] ?? 0] : [...values])
		);
		const [at400] = derivedCharge(lacking, [400]);
		expect(at400?.charge.values[0]).toBeNaN();
		expect(at400?.charge.values[1]).toBeGreaterThan(25e-9);
	});
});

describe('a quality factor', () => {
	it('is 1/(2πf·C·r_s), with a bound turned round', () => {
		// 1/(2π·470e6·12e-12·0.5) = 56.44: by hand.
		const found = derivedQuality(470e6, column(4, [12e-12, 12e-12, NaN]), {
			values: Float64Array.of(0.5, 0.25, 0.5),
			censored: Int8Array.of(0, -1, 0),
			sets: [3]
		});
		expect(found.values[0]).toBeCloseTo(56.44, 2);
		expect((found.values[1] ?? 0) / (found.values[0] ?? 1)).toBeCloseTo(2, 12);
		expect(found.values[2]).toBeNaN();
		expect([...(found.censored ?? [])]).toEqual([0, 1, 0]);
		expect(found.sets).toEqual([1, 3]);
	});
});

describe('a temperature coefficient', () => {
	it('is the slope of ln C of a device that was at every temperature', () => {
		const found = derivedCoefficient(
			[-40, 25, 85].map((temperatureCelsius) => ({
				temperatureCelsius,
				column: column(4, [
					12e-12 * Math.exp(2e-4 * temperatureCelsius),
					temperatureCelsius === 25 ? NaN : 12e-12
				])
			}))
		);
		expect(found?.values[0]).toBeCloseTo(2e-4, 12);
		expect(found?.values[1]).toBeNaN();
	});

	it('needs two temperatures', () => {
		expect(
			derivedCoefficient([{ temperatureCelsius: 25, column: column(4, [1e-12]) }])
		).toBeUndefined();
	});
});
