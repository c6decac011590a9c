import { findUnitOfSize } from '../units/unit';
import type { DeviceColumns } from './blocks';

/** A stored matrix with what its rows and columns are. */
export interface ExportBlock {
	readonly temperatureCelsius: number;
	readonly frequency: number;
	readonly devices: DeviceColumns;
	readonly biases: readonly number[];
	readonly values: Float64Array;
}

/** The header of an exported set; its capacitances are in the unit of the uploaded file. */
export function exportHeader(unitScale: number): string {
	const unit = findUnitOfSize('capacitance', unitScale)?.symbol ?? 'F';
	return `lot,wafer,site,element,device,temperature_C,frequency_Hz,bias_V,capacitance_${unit === 'µF' ? 'uF' : unit}`;
}

/**
 * The readings of a block, a line each, as the uploaded file gave them: numbers are the shortest
 * decimals of what was stored, so reading them again gives the same numbers to the last digit.
 */
export function* exportLines(block: ExportBlock): Generator<string> {
	const { devices, biases, values } = block;
	for (let row = 0; row < devices.lot.length; row++) {
		const names = [devices.lot, devices.wafer, devices.site, devices.element, devices.name]
			.map((column) => quoted(column[row] ?? ''))
			.join(',');
		const start = `${names},${block.temperatureCelsius},${block.frequency}`;
		for (const [column, bias] of biases.entries()) {
			const value = values[row * biases.length + column] ?? Number.NaN;
			if (!Number.isNaN(value)) yield `${start},${bias},${value}`;
		}
	}
}

function quoted(name: string): string {
	return /[",\r\n]|^\s|\s$/.test(name) ? `"${name.replaceAll('"', '""')}"` : name;
}
