import { decimalOf, magnitude, numberOf, plus, times } from './decimal';

/** The kinds of quantity that files and tables hold. */
export type UnitKind =
	| 'capacitance'
	| 'voltage'
	| 'current'
	| 'resistance'
	| 'time'
	| 'thermalResistance'
	| 'currentSlope'
	| 'frequency'
	| 'temperature';

export interface Unit {
	/** As it is printed. */
	readonly symbol: string;
	/** One unit in SI (temperature: in °C). A power of ten, so that a decimal stays one. */
	readonly scale: number;
	/** Added after scaling: −273.15 from kelvin to °C. */
	readonly offset?: number;
	/** Other spellings that files use. */
	readonly spellings?: readonly string[];
}

/** Every unit Platen reads, by what it measures; the first of a kind is the base unit. */
export const UNITS = {
	capacitance: [
		{ symbol: 'F', scale: 1, spellings: ['farad', 'farads'] },
		{ symbol: 'µF', scale: 1e-6, spellings: ['uF', 'microfarad'] },
		{ symbol: 'nF', scale: 1e-9, spellings: ['nanofarad'] },
		{ symbol: 'pF', scale: 1e-12, spellings: ['picofarad'] },
		{ symbol: 'fF', scale: 1e-15, spellings: ['femtofarad'] }
	],
	voltage: [
		{ symbol: 'V', scale: 1, spellings: ['volt', 'volts'] },
		{ symbol: 'mV', scale: 1e-3, spellings: ['millivolt'] },
		{ symbol: 'kV', scale: 1e3, spellings: ['kilovolt'] }
	],
	current: [
		{ symbol: 'A', scale: 1, spellings: ['ampere', 'amp'] },
		{ symbol: 'mA', scale: 1e-3 },
		{ symbol: 'µA', scale: 1e-6, spellings: ['uA'] },
		{ symbol: 'nA', scale: 1e-9 },
		{ symbol: 'pA', scale: 1e-12 }
	],
	resistance: [
		{ symbol: 'Ω', scale: 1, spellings: ['\u2126', 'ohm', 'Ohm', 'ohms'] },
		{ symbol: 'mΩ', scale: 1e-3, spellings: ['m\u2126', 'mohm', 'mOhm', 'milliohm'] },
		{ symbol: 'kΩ', scale: 1e3, spellings: ['k\u2126', 'kohm', 'kOhm', 'kiloohm'] }
	],
	time: [
		{ symbol: 's', scale: 1, spellings: ['second', 'seconds'] },
		{ symbol: 'ms', scale: 1e-3, spellings: ['millisecond'] },
		{ symbol: 'µs', scale: 1e-6, spellings: ['us', 'microsecond'] },
		{ symbol: 'ns', scale: 1e-9, spellings: ['nanosecond'] }
	],
	thermalResistance: [{ symbol: 'K/W', scale: 1, spellings: ['°C/W', 'C/W', 'degC/W'] }],
	currentSlope: [
		{ symbol: 'A/s', scale: 1 },
		{ symbol: 'A/µs', scale: 1e6, spellings: ['A/us'] }
	],
	frequency: [
		{ symbol: 'Hz', scale: 1, spellings: ['hertz'] },
		{ symbol: 'kHz', scale: 1e3, spellings: ['kilohertz'] },
		{ symbol: 'MHz', scale: 1e6, spellings: ['megahertz'] },
		{ symbol: 'GHz', scale: 1e9, spellings: ['gigahertz'] }
	],
	temperature: [
		{ symbol: '°C', scale: 1, spellings: ['C', 'degC', 'deg C', 'deg. C', 'ºC', 'celsius'] },
		{ symbol: 'K', scale: 1, offset: -273.15, spellings: ['kelvin'] }
	]
} as const satisfies Record<UnitKind, readonly Unit[]>;

/** Micro and degree have look-alikes in Unicode: µ and μ, ° and º. */
const plain = (text: string) => text.trim().replaceAll('\u03bc', 'µ').replaceAll('º', '°');

/**
 * The unit of a kind that is written this way. Prefixes differ by case (`mV`, `MHz`), so case
 * counts, except in words written out.
 */
export function findUnit(kind: UnitKind, text: string): Unit | undefined {
	const wanted = plain(text);
	const units: readonly Unit[] = UNITS[kind];
	return units.find(
		({ symbol, spellings = [] }) =>
			symbol === wanted ||
			spellings.some(
				(spelling) =>
					plain(spelling) === wanted ||
					(spelling.length > 4 && spelling.toLowerCase() === wanted.toLowerCase())
			)
	);
}

/**
 * A value of a unit in SI (temperature in °C), by exact decimal arithmetic: 500 mV is 0.5 V and
 * 298.15 K is 25 °C, which no binary product or difference gives.
 */
export function inSi(value: number, { scale, offset = 0 }: Unit): number {
	return numberOf(plus(times(decimalOf(value), decimalOf(scale)), decimalOf(offset)));
}

/**
 * An SI value in a unit whose size is a power of ten, by shifting the decimal point: 1.25e-11 F is
 * 12.5 pF, where 1.25e-11 / 1e-12 in binary is 12.500000000000002.
 *
 * @throws {RangeError} for a scale that is no power of ten
 */
export function inUnit(value: number, unitScale: number): number {
	const scale = decimalOf(unitScale);
	const power = magnitude(scale);
	if (power === undefined || scale.digits !== 10n ** BigInt(power - scale.exponent))
		throw new RangeError(`a unit's size requires a power of ten, got ${unitScale}`);
	const { digits, exponent } = decimalOf(value);
	return numberOf({ digits, exponent: exponent - power });
}

/** The unit of a kind that is so large in SI, without an offset. */
export function findUnitOfSize(kind: UnitKind, scale: number): Unit | undefined {
	const units: readonly Unit[] = UNITS[kind];
	return units.find((unit) => unit.scale === scale && unit.offset === undefined);
}
