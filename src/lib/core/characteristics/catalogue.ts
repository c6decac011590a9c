import type { Condition } from './condition';
import { symbolText, type LetterSymbol } from './symbol';

/** What is measured or computed of a device, as tables, templates and files name it. */
export interface Characteristic {
	/** The plain text of its symbol: distributions and templates refer to it by this. */
	readonly key: string;
	readonly symbol: LetterSymbol;
	readonly name: string;
	/** SI unit of the stored values. */
	readonly unit: string;
	/** What its value depends on, beside the junction temperature; a reading always states the first. */
	readonly axes: readonly Exclude<keyof Condition, 'temperatureCelsius'>[];
	/** Whether files give it as sweeps along the bias or as single readings. */
	readonly measuredAs: 'sweep' | 'reading';
	/** How values are transformed before they are summed up, unless somebody overrides it. */
	readonly transform: 'identity' | 'ln' | 'log10';
	/** Whether it can only fall as reverse bias rises. */
	readonly fallsWithReverseVoltage: boolean;
}

/**
 * Characteristics that measurements give. Letter symbols follow IEC 60747-1. A new one is one more
 * entry here, and a reader that fills it.
 */
export const CHARACTERISTICS = [
	{
		key: 'C_tot',
		symbol: { quantity: 'C', subscript: 'tot' },
		name: 'Total capacitance',
		unit: 'F',
		axes: ['frequency', 'reverseVoltage'],
		measuredAs: 'sweep',
		transform: 'ln',
		fallsWithReverseVoltage: true
	},
	{
		key: 'V_F',
		symbol: { quantity: 'V', subscript: 'F' },
		name: 'Forward voltage',
		unit: 'V',
		axes: ['forwardCurrent', 'pulseDuration'],
		measuredAs: 'reading',
		transform: 'identity',
		fallsWithReverseVoltage: false
	},
	{
		key: 'I_R',
		symbol: { quantity: 'I', subscript: 'R' },
		name: 'Reverse current',
		unit: 'A',
		axes: ['reverseVoltage', 'pulseDuration'],
		measuredAs: 'reading',
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 'V_(BR)',
		symbol: { quantity: 'V', subscript: '(BR)' },
		name: 'Breakdown voltage',
		unit: 'V',
		axes: ['reverseCurrent', 'pulseDuration'],
		measuredAs: 'reading',
		transform: 'identity',
		fallsWithReverseVoltage: false
	},
	{
		key: 'r_s',
		symbol: { quantity: 'r', subscript: 's' },
		name: 'Series resistance',
		unit: 'Ω',
		axes: ['frequency', 'reverseVoltage', 'forwardCurrent'],
		measuredAs: 'reading',
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 't_rr',
		symbol: { quantity: 't', subscript: 'rr' },
		name: 'Reverse recovery time',
		unit: 's',
		axes: ['forwardCurrent', 'reverseVoltage', 'reverseCurrent', 'currentSlope'],
		measuredAs: 'reading',
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 'R_th(j-mb)',
		symbol: { quantity: 'R', subscript: 'th(j-mb)' },
		name: 'Thermal resistance from junction to mounting base',
		unit: 'K/W',
		axes: [],
		measuredAs: 'reading',
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 'R_th(j-a)',
		symbol: { quantity: 'R', subscript: 'th(j-a)' },
		name: 'Thermal resistance from junction to ambient',
		unit: 'K/W',
		axes: [],
		measuredAs: 'reading',
		transform: 'ln',
		fallsWithReverseVoltage: false
	}
] as const satisfies readonly Characteristic[];

/** The characteristic with this key, or `undefined`. */
export function findCharacteristic(key: string): Characteristic | undefined {
	return CHARACTERISTICS.find((entry) => entry.key === key);
}

/** `C_tot` for its entry: keys are the symbols' plain texts, which the catalogue's test checks. */
export const keyOf = ({ symbol }: Pick<Characteristic, 'symbol'>) => symbolText(symbol);
