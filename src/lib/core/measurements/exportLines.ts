import { findUnitOfSize, UNITS } from '../units/unit';
import type { DeviceColumns } from './blocks';
import { quotedName } from './quotedName';
import type { SweptQuantity } from './sweepTable';

/** A stored matrix with what its rows and columns are. */
export interface ExportBlock {
	readonly temperatureCelsius: number;
	/** In Hz; a current has none. */
	readonly frequency: number | undefined;
	readonly devices: DeviceColumns;
	readonly biases: readonly number[];
	readonly values: Float64Array;
}

/** The header of an exported set; what was swept is in the unit of the uploaded file. */
export function exportHeader(unitScale: number, quantity: SweptQuantity = 'capacitance'): string {
	const unit = findUnitOfSize(quantity, unitScale)?.symbol ?? UNITS[quantity][0].symbol;
	const frequency = quantity === 'capacitance' ? 'frequency_Hz,' : '';
	return `lot,wafer,site,element,device,temperature_C,${frequency}bias_V,${quantity}_${unit.replace('µ', 'u')}`;
}

/**
 * The readings of a block, a line each, as the uploaded file gave them: numbers are the shortest
 * decimals of what was stored, so reading them again gives the same numbers to the last digit.
 */
export function* exportLines(block: ExportBlock): Generator<string> {
	const { devices, biases, values } = block;
	for (let row = 0; row < devices.lot.length; row++) {
		const names = [devices.lot, devices.wafer, devices.site, devices.element, devices.name]
			.map((column) => quotedName(column[row] ?? ''))
			.join(',');
		const frequency = block.frequency === undefined ? '' : `,${block.frequency}`;
		const start = `${names},${block.temperatureCelsius}${frequency}`;
		for (const [column, bias] of biases.entries()) {
			const value = values[row * biases.length + column] ?? Number.NaN;
			if (!Number.isNaN(value)) yield `${start},${bias},${value}`;
		}
	}
}
