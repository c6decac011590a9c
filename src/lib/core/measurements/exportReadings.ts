import type { Condition } from '../characteristics/condition';
import { censorMark } from './censorMark';
import type { DeviceColumns } from './blocks';
import { quotedName } from './quotedName';

/** A stored block of readings with what its rows are. */
export interface ReadingExportBlock {
	readonly characteristic: string;
	readonly condition: Condition;
	/** Symbol of the unit of the uploaded file. */
	readonly unit: string;
	readonly devices: DeviceColumns;
	readonly values: Float64Array;
	readonly censored: Int8Array;
}

/** The columns of the conditions, as an upload recognises them again. */
const CONDITIONS = [
	['temperatureCelsius', 'temperature_C'],
	['frequency', 'frequency_Hz'],
	['reverseVoltage', 'reverse_voltage_V'],
	['forwardCurrent', 'forward_current_A'],
	['reverseCurrent', 'reverse_current_A'],
	['pulseDuration', 'pulse_duration_s'],
	['currentSlope', 'current_slope_A/s']
] as const satisfies readonly (readonly [keyof Condition, string])[];

export const READINGS_HEADER = [
	'lot,wafer,site,element,device,characteristic',
	...CONDITIONS.map(([, header]) => header),
	'value,unit,censored'
].join(',');

/**
 * The readings of a block, a line each, as the uploaded file gave them: numbers are the shortest
 * decimals of what was stored, so reading them again gives the same numbers to the last digit.
 */
export function* exportReadings(block: ReadingExportBlock): Generator<string> {
	const { devices, values, censored, condition } = block;
	const at = CONDITIONS.map(([part]) => condition[part] ?? '').join(',');
	for (const [row, value] of values.entries()) {
		if (Number.isNaN(value)) continue;
		const names = [devices.lot, devices.wafer, devices.site, devices.element, devices.name]
			.map((column) => quotedName(column[row] ?? ''))
			.join(',');
		const mark = censorMark(censored[row] ?? 0);
		yield `${names},${block.characteristic},${at},${value},${block.unit},${mark}`;
	}
}
