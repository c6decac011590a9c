import type { Characteristic } from '../characteristics/catalogue';
import { capacitanceUnit, type TableUnit } from './tableUnit';

const PREFIXES = [
	['p', 1e-12],
	['n', 1e-9],
	['µ', 1e-6],
	['m', 1e-3],
	['', 1],
	['k', 1e3]
] as const;

/** Units that are shown as they are: nobody writes a breakdown voltage in kV or a ratio in m. */
const PLAIN = new Set(['V', 'K/W', '']);

/**
 * One unit for all values of a characteristic in a table: with the prefix that leaves figures before
 * the point at the geometric middle of the typical values, except where the trade uses none. A
 * temperature coefficient is in parts per million.
 */
export function characteristicUnit(
	characteristic: Pick<Characteristic, 'unit'>,
	typicals: readonly number[]
): TableUnit {
	const { unit } = characteristic;
	if (unit === 'F') return capacitanceUnit(typicals);
	if (unit === '1/K') return { unit: '10⁻⁶/K', unitScale: 1e-6 };
	const sizes = typicals.map(Math.abs).filter((size) => size > 0);
	if (PLAIN.has(unit) || sizes.length === 0) return { unit, unitScale: 1 };
	const middle = Math.exp(sizes.reduce((sum, size) => sum + Math.log(size), 0) / sizes.length);
	const [prefix, unitScale] = PREFIXES.findLast(([, size]) => middle >= size) ?? PREFIXES[0];
	return { unit: `${prefix}${unit}`, unitScale };
}
