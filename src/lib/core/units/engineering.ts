import { decimalOf, magnitude } from './decimal';
import { roundNearest } from './rounding';

const PREFIXES = new Map([
	[-18, 'a'],
	[-15, 'f'],
	[-12, 'p'],
	[-9, 'n'],
	[-6, 'µ'],
	[-3, 'm'],
	[0, ''],
	[3, 'k'],
	[6, 'M'],
	[9, 'G'],
	[12, 'T']
]);
const NO_BREAK_SPACE = '\u00a0';

/** A number and the unit it is in. */
export interface Engineering {
	readonly text: string;
	readonly unit: string;
}

/**
 * An SI value in the unit that leaves one to three figures before the point: 1.25e-11 F at three
 * figures is `12.5` and `pF`. Zero stays in the base unit.
 */
export function engineering(
	value: number,
	baseUnit: string,
	significantFigures: number
): Engineering {
	const rounded = roundNearest(value, { significantFigures });
	const { digits, exponent } = decimalOf(rounded.value);
	const first = magnitude({ digits, exponent });
	if (first === undefined) return { text: '0', unit: baseUnit };

	const power = Math.min(12, Math.max(-18, Math.floor(first / 3) * 3));
	const scaled = Number(`${digits}e${exponent - power}`);
	return {
		text: roundNearest(scaled, { significantFigures }).text,
		unit: `${PREFIXES.get(power) ?? ''}${baseUnit}`
	};
}

/** Number and unit in one text, with the space between them unbreakable: `12.5 pF`. */
export function inEngineeringUnits(
	value: number,
	baseUnit: string,
	significantFigures: number
): string {
	const { text, unit } = engineering(value, baseUnit, significantFigures);
	return `${text}${NO_BREAK_SPACE}${unit}`;
}
