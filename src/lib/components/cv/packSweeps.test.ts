import { expect, it } from 'vitest';
import { packSweeps, unpackSweeps } from './packSweeps';

const sweep = (name: string, ...readings: [number, number][]) => ({
	name,
	isOutside: name === 'B',
	readings: readings.map(([bias, capacitance]) => ({ bias, capacitance }))
});

it('comes back with four figures, each sweep on its own biases', () => {
	const sweeps = [
		sweep('A', [0, 12.3456], [1, 8.1]),
		sweep('B', [0, 12], [4, 3]),
		sweep('C', [0, 11], [1, 7])
	];
	const packed = packSweeps(sweeps);
	expect(packed.grids).toEqual([
		[0, 1],
		[0, 4]
	]);
	expect(unpackSweeps(packed)).toEqual([sweep('A', [0, 12.35], [1, 8.1]), ...sweeps.slice(1)]);
});

it('carries eighty sweeps of a hundred biases in less than 80 kB', () => {
	const biases = Array.from({ length: 100 }, (_, i): [number, number] => [
		i / 3,
		123.456 / (i + 1)
	]);
	const eighty = Array.from({ length: 80 }, (_, i) => sweep(`LK26-011 · 07 · ${i}`, ...biases));
	expect(JSON.stringify(packSweeps(eighty)).length).toBeLessThan(80_000);
});
