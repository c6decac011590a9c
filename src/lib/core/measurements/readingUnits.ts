import { UNITS } from '../units/unit';
import type { UnitKind } from '../units/unit';

/** The kinds of quantity that single readings are of. */
export const READING_KINDS = [
	'voltage',
	'current',
	'resistance',
	'time',
	'thermalResistance'
] as const satisfies readonly UnitKind[];

/** The kind whose base unit this is: `A` is a current's; `undefined` for what no reading is of. */
export function readingKind(baseUnit: string): UnitKind | undefined {
	return READING_KINDS.find((kind) => UNITS[kind][0].symbol === baseUnit);
}
