import type { DeviceSweep } from '$lib/plot/capacitanceChart';

/** Sweeps as they travel: biases once a grid, readings as bare numbers. */
export interface PackedSweeps {
	readonly grids: readonly (readonly number[])[];
	readonly sweeps: readonly {
		readonly name: string;
		readonly isOutside: boolean;
		/** Place of its biases among the grids. */
		readonly grid: number;
		readonly capacitances: readonly number[];
	}[];
}

/** A chart shows no more figures. */
const FIGURES = 4;

export function packSweeps(sweeps: readonly DeviceSweep[]): PackedSweeps {
	const grids = new Map<string, { place: number; biases: number[] }>();
	const packed = sweeps.map(({ name, isOutside, readings }) => {
		const biases = readings.map(({ bias }) => bias);
		const key = biases.join(' ');
		const grid = grids.get(key) ?? { place: grids.size, biases };
		grids.set(key, grid);
		return {
			...{ name, isOutside, grid: grid.place },
			capacitances: readings.map(({ capacitance }) => Number(capacitance.toPrecision(FIGURES)))
		};
	});
	return { grids: [...grids.values()].map(({ biases }) => biases), sweeps: packed };
}

export function unpackSweeps({ grids, sweeps }: PackedSweeps): DeviceSweep[] {
	return sweeps.map(({ name, isOutside, grid, capacitances }) => ({
		name,
		isOutside,
		readings: (grids[grid] ?? []).map((bias, at) => ({
			bias,
			capacitance: capacitances[at] ?? Number.NaN
		}))
	}));
}
