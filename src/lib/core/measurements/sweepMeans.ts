import type { ConditionSweeps } from './sweepTable';

/**
 * ln of each device's mean capacitance at each bias of one condition, in the file's unit. Of a
 * current its size counts, and what is smaller than one step of the resolution is one step.
 */
export interface SweepMeans {
	readonly deviceCount: number;
	/** In V, from the lowest to the highest. */
	readonly biases: readonly number[];
	/** One step of the readings' resolution at each bias, in the file's unit. */
	readonly steps: readonly number[];
	/** NaN where a device has no reading. */
	ln(device: number, position: number): number;
}

/** Repeated readings are averaged; biases are put in order. */
export function sweepMeans(condition: ConditionSweeps, deviceCount: number): SweepMeans {
	const ordered = condition.columnsByBias();
	const width = ordered.length;
	const values = new Float64Array(deviceCount * width);
	const steps = ordered.map(({ columns }) =>
		Number(`1e${-Math.max(...columns.map((column) => condition.decimals[column] ?? 0))}`)
	);
	const isCurrent = condition.quantity === 'current';
	for (let device = 0; device < deviceCount; device++) {
		for (let position = 0; position < width; position++) {
			let [sum, count] = [0, 0];
			for (const column of ordered[position]?.columns ?? []) {
				const value = condition.value(device, column);
				if (Number.isNaN(value)) continue;
				sum += value;
				count += 1;
			}
			const mean = sum / count;
			values[device * width + position] = Math.log(
				isCurrent ? Math.max(Math.abs(mean), steps[position] ?? 0) : mean
			);
		}
	}
	return {
		deviceCount,
		biases: ordered.map(({ bias }) => bias),
		steps,
		ln: (device, position) => values[device * width + position] ?? Number.NaN
	};
}
