import { expect, it } from 'vitest';
import { normalSource, randomSource } from './randomSource';

it('repeats itself for a seed, and differs between seeds', () => {
	const [first, again, other] = [randomSource(7), randomSource(7), randomSource(8)];
	const draws = Array.from({ length: 5 }, first);
	expect(Array.from({ length: 5 }, again)).toEqual(draws);
	expect(Array.from({ length: 5 }, other)).not.toEqual(draws);
});

// Mean 1/2 and variance 1/12; of 200 000 draws the standard errors are 6e-4 and 2e-4
it('is uniform, each draw unrelated to the one before', () => {
	const random = randomSource(1);
	const draws = Float64Array.from({ length: 200_000 }, random);
	const mean = draws.reduce((sum, x) => sum + x, 0) / draws.length;
	let [variance, lagged] = [0, 0];
	for (let i = 1; i < draws.length; i++) {
		variance += (draws[i]! - 0.5) ** 2;
		lagged += (draws[i]! - 0.5) * (draws[i - 1]! - 0.5);
	}
	expect(Math.abs(mean - 0.5)).toBeLessThan(0.0026);
	expect(Math.abs(variance / draws.length - 1 / 12)).toBeLessThan(0.0008);
	expect(Math.abs(lagged / variance)).toBeLessThan(0.009);
});

// Moments 0, 1, 0, 3 of the standard normal
it('draws a standard normal', () => {
	const normal = normalSource(randomSource(2));
	const draws = Float64Array.from({ length: 200_000 }, normal);
	const moment = (power: number) => draws.reduce((sum, x) => sum + x ** power, 0) / draws.length;
	expect(Math.abs(moment(1))).toBeLessThan(0.009);
	expect(Math.abs(moment(2) - 1)).toBeLessThan(0.013);
	expect(Math.abs(moment(3))).toBeLessThan(0.035);
	expect(Math.abs(moment(4) - 3)).toBeLessThan(0.09);
});
