import { temperatureCoefficient } from '../junction/derivedQuantities';
import type { BiasColumn } from './conditionColumns';
import type { DerivedColumn } from './derivedColumn';

/** The capacitances of one bias at one temperature in °C. */
export interface ColumnAtTemperature {
	readonly temperatureCelsius: number;
	readonly column: BiasColumn;
}

/**
 * (1/C) dC/dT of each device that was measured at every one of the temperatures: the slope of its
 * own ln C. A device that lacks one is left out, as its slope would speak of another range.
 *
 * @returns `undefined` for fewer than two temperatures
 */
export function derivedCoefficient(
	columns: readonly ColumnAtTemperature[]
): DerivedColumn | undefined {
	const [first] = columns;
	if (first === undefined || columns.length < 2) return undefined;
	const temperatures = columns.map(({ temperatureCelsius }) => temperatureCelsius);
	return {
		values: first.column.values.map((_, device) => {
			const values = columns.map(({ column }) => column.values[device] ?? Number.NaN);
			return values.some(Number.isNaN) ? Number.NaN : temperatureCoefficient(temperatures, values);
		}),
		sets: [...new Set(columns.flatMap(({ column }) => column.sets))].sort((a, b) => a - b)
	};
}
