import type { DeviceIndex } from './indexDevices';

/** A packed block, opened: one matrix of devices × biases at one temperature and frequency. */
export interface SweepMatrix {
	readonly set: number;
	/** Row of the set that the first row of the matrix is. */
	readonly firstRow: number;
	/** Bias of each column in V, reverse positive. */
	readonly grid: readonly number[];
	/** One unit of the values in SI. */
	readonly unitScale: number;
	/** Row by row; NaN is absent. */
	readonly values: Float64Array;
}

/** The values of one bias: one a device in SI units, NaN where it has none. */
export interface BiasColumn {
	readonly bias: number;
	readonly values: Float64Array;
	/** The sets that gave a value. */
	readonly sets: readonly number[];
}

interface Column {
	readonly sums: Float64Array;
	readonly counts: Uint16Array;
	readonly sets: Set<number>;
}

/**
 * Gathers the sweeps of one temperature and frequency, block by block, into one column a bias. What
 * a device has several times at one bias is averaged.
 */
export class ConditionColumns {
	readonly #devices: DeviceIndex;
	readonly #columns = new Map<number, Column>();

	constructor(devices: DeviceIndex) {
		this.#devices = devices;
	}

	/** @param isLeftOut whether the device in this row of the set is excluded or quarantined */
	add(matrix: SweepMatrix, isLeftOut: (row: number) => boolean): void {
		const { grid, values, unitScale } = matrix;
		const devices = this.#devices.devicesOf.get(matrix.set);
		if (devices === undefined) return;
		const points = grid.length;
		const deviceOfRow = Int32Array.from({ length: values.length / points }, (_, r) => {
			const row = matrix.firstRow + r;
			return isLeftOut(row) ? -1 : (devices[row] ?? -1);
		});
		for (const [position, bias] of grid.entries()) {
			const { sums, counts, sets } = this.#column(bias);
			let isUsed = false;
			for (let r = 0; r < deviceOfRow.length; r++) {
				const device = deviceOfRow[r]!;
				const value = values[r * points + position]!;
				if (device < 0 || Number.isNaN(value)) continue;
				sums[device]! += value * unitScale;
				counts[device]! += 1;
				isUsed = true;
			}
			if (isUsed) sets.add(matrix.set);
		}
	}

	/** The columns gathered so far, from the lowest bias to the highest. */
	columns(): BiasColumn[] {
		return [...this.#columns]
			.sort(([a], [b]) => a - b)
			.map(([bias, { sums, counts, sets }]) => ({
				bias,
				values: averages(sums, counts),
				sets: [...sets].sort((a, b) => a - b)
			}));
	}

	#column(bias: number): Column {
		let column = this.#columns.get(bias);
		if (column === undefined) {
			column = {
				sums: new Float64Array(this.#devices.deviceCount),
				counts: new Uint16Array(this.#devices.deviceCount),
				sets: new Set()
			};
			this.#columns.set(bias, column);
		}
		return column;
	}
}

/** NaN for a device without a value. */
function averages(sums: Float64Array, counts: Uint16Array): Float64Array {
	const means = new Float64Array(sums.length);
	for (let device = 0; device < sums.length; device++)
		means[device] = sums[device]! / counts[device]!;
	return means;
}
