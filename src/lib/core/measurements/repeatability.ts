import type { ConditionSweeps } from './sweepTable';

/** How closely capacitances of one device at one bias agree. */
export interface Repeatability {
	/** Readings beyond the first of a device and bias. */
	readonly degreesOfFreedom: number;
	/** Pooled standard deviation of ln C within a device and bias: a relative spread. */
	readonly standardDeviation: number;
}

/**
 * The spread of repeated readings, pooled over devices and biases: √(Σ(y − ȳ)² / Σ(r − 1)) of
 * y = ln C. `undefined` when no bias was read twice.
 */
export function repeatability(
	conditions: readonly ConditionSweeps[],
	deviceCount: number
): Repeatability | undefined {
	let degreesOfFreedom = 0;
	let squares = 0;
	for (const condition of conditions.filter(({ quantity }) => quantity === 'capacitance')) {
		for (const { columns } of condition.columnsByBias()) {
			if (columns.length < 2) continue;
			for (let device = 0; device < deviceCount; device++) {
				const readings = columns
					.map((column) => Math.log(condition.value(device, column)))
					.filter((value) => !Number.isNaN(value));
				if (readings.length < 2) continue;
				const mean = readings.reduce((sum, value) => sum + value, 0) / readings.length;
				for (const value of readings) squares += (value - mean) ** 2;
				degreesOfFreedom += readings.length - 1;
			}
		}
	}
	return degreesOfFreedom === 0
		? undefined
		: { degreesOfFreedom, standardDeviation: Math.sqrt(squares / degreesOfFreedom) };
}
