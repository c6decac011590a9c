import { expect, it } from 'vitest';
import { sweepMeans } from './sweepMeans';
import { sweepNoise } from './sweepNoise';
import { SweepTable } from './sweepTable';

/** A linear congruential generator: the same noise in every run. */
function* uniform(seed: number): Generator<number> {
	for (let state = seed; ;) {
		state = (state * 1_103_515_245 + 12_345) % 2 ** 31;
		yield state / 2 ** 31;
	}
}

/** 60 devices that differ by up to 5 % in height and steepness, read at 20 biases with this noise. */
function noiseFound(noise: number): number {
	const random = uniform(7);
	const next = () => Number(random.next().value);
	const normal = () => Array.from({ length: 12 }, next).reduce((sum, value) => sum + value, -6);
	const table = new SweepTable();
	const lots = Array.from({ length: 60 }, () => 'A');
	for (let device = 0; device < lots.length; device++) {
		table.deviceIndex({ lot: 'A', wafer: '1', site: '', element: '', name: String(device) });
		const [height, steepness] = [1 + 0.05 * next(), 1 + 0.05 * next()];
		for (let bias = 0; bias < 20; bias++) {
			const value = 40 * height * (1 + bias / 2) ** -steepness * Math.exp(noise * normal());
			table.condition(25, 1e6)?.add(device, bias, value, 6);
		}
	}
	const [condition] = table.conditions();
	if (condition === undefined) throw new Error('no sweeps');
	return sweepNoise(sweepMeans(condition, lots.length), lots);
}

it('finds the noise of readings, whatever devices differ by', () => {
	// 1080 second differences estimate a spread to a few per cent; the lot's median takes a little.
	expect(noiseFound(0.002)).toBeGreaterThan(0.0018);
	expect(noiseFound(0.002)).toBeLessThan(0.0022);
	expect(noiseFound(0.01) / noiseFound(0.002)).toBeCloseTo(5, 0);
});

it('is next to nothing for sweeps without noise', () => {
	expect(noiseFound(0)).toBeLessThan(0.0005);
});
