import { conditionKey } from '$lib/core/characteristics/condition';
import type { DeviceNames } from '$lib/core/distributions/indexDevices';
import { CHUNK } from '$lib/core/measurements/blocks';
import type { Connection } from '../db/database';
import { readBasis } from './readBasis';
import { readDevices, readSweeps } from './readSweeps';

/** The most sweeps a chart gets, and how many of them may be ones that leave the limits. */
const MOST_SWEEPS = 80;
const MOST_OUTSIDE = 20;

export interface SampledSweep {
	readonly name: string;
	readonly isOutside: boolean;
	/** Biases in V, capacitances in the unit asked for. */
	readonly readings: readonly { readonly bias: number; readonly capacitance: number }[];
}

export interface SweepSample {
	/** Sweeps that count, and those among them that leave the printed limits somewhere. */
	readonly total: number;
	readonly outside: number;
	readonly sweeps: readonly SampledSweep[];
}

export interface SampleRequest {
	readonly product: number;
	readonly temperatureCelsius: number;
	readonly frequency: number | undefined;
	readonly unitScale: number;
	/** Printed limits in the same unit, by bias in V. */
	readonly limits: ReadonlyMap<
		number,
		{ readonly minimum: number | null; readonly maximum: number | null }
	>;
}

/**
 * A few sweeps to draw behind a band: evenly through the devices in the order they are stored, and
 * the first ones that leave the printed limits. Reads one block at a time.
 */
export async function sampleSweeps(db: Connection, request: SampleRequest): Promise<SweepSample> {
	const basis = await readBasis(db, request.product);
	const sets = basis?.inputs.sets.map(({ id }) => id) ?? [];
	const sweepKey = conditionKey({
		temperatureCelsius: request.temperatureCelsius,
		...(request.frequency === undefined ? {} : { frequency: request.frequency })
	});
	const leftOut = new Set(
		basis?.inputs.leftOut
			.filter((of) => of.conditionKey === sweepKey)
			.map(({ set, device }) => `${set} ${device}`)
	);
	const names = new Map<string, DeviceNames>();
	let devices = 0;
	for (const { set, chunks } of await readDevices(db, sets)) {
		for (const { chunk, devices: of } of chunks) {
			names.set(`${set} ${chunk * CHUNK}`, of);
			devices += of.name.length;
		}
	}

	const stride = Math.max(1, Math.ceil(devices / (MOST_SWEEPS - MOST_OUTSIDE)));
	const sweeps: SampledSweep[] = [];
	let [total, outside, drawnOutside] = [0, 0, 0];
	for await (const { set, firstRow, grid, unitScale, values } of readSweeps(db, sets, sweepKey)) {
		const scale = unitScale / request.unitScale;
		for (let row = 0; row * grid.length < values.length; row++) {
			if (leftOut.has(`${set} ${firstRow + row}`)) continue;
			const sweep = values.subarray(row * grid.length, (row + 1) * grid.length);
			const isOutside = leavesLimits(sweep, grid, scale, request.limits);
			if (isOutside) outside += 1;
			const isDrawn = isOutside ? drawnOutside++ < MOST_OUTSIDE : total % stride === 0;
			total += 1;
			if (!isDrawn || sweeps.length >= MOST_SWEEPS) continue;
			sweeps.push({
				name: nameOf(names.get(`${set} ${firstRow}`), row),
				isOutside,
				readings: grid.flatMap((bias, position) => {
					const capacitance = (sweep[position] ?? Number.NaN) * scale;
					return Number.isNaN(capacitance)
						? []
						: [{ bias, capacitance: Number(capacitance.toPrecision(6)) }];
				})
			});
		}
	}
	return { total, outside, sweeps };
}

function leavesLimits(
	sweep: Float64Array,
	grid: readonly number[],
	scale: number,
	limits: SampleRequest['limits']
): boolean {
	return grid.some((bias, position) => {
		const value = (sweep[position] ?? Number.NaN) * scale;
		const at = limits.get(bias);
		if (at === undefined || Number.isNaN(value)) return false;
		return (
			(at.minimum !== null && value < at.minimum) || (at.maximum !== null && value > at.maximum)
		);
	});
}

function nameOf(names: DeviceNames | undefined, row: number): string {
	return [names?.lot[row], names?.wafer[row], names?.site[row], names?.name[row]]
		.filter((part) => part !== undefined && part !== '')
		.join(' · ');
}
