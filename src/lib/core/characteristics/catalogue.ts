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
	/**
	 * Whether files give it as sweeps along the bias or as single readings, or it is computed device
	 * by device from what they give.
	 */
	readonly measuredAs: 'sweep' | 'reading' | 'derived';
	/** Which limits are promised of it when nobody says otherwise. */
	readonly promised: readonly ('minimum' | 'maximum')[];
	/** How values are transformed before they are summed up, unless somebody overrides it. */
	readonly transform: 'identity' | 'ln' | 'log10';
	/** Whether it can only fall as reverse bias rises. */
	readonly fallsWithReverseVoltage: boolean;
}

/**
 * Characteristics that measurements give. Letter symbols follow IEC 60747-1. A new one is one more
 * entry here, and a reader that fills it; a derived one is computed in `derivedColumns`.
 */
export const CHARACTERISTICS = [
	{
		key: 'C_tot',
		symbol: { quantity: 'C', subscript: 'tot' },
		name: 'Total capacitance',
		unit: 'F',
		axes: ['frequency', 'reverseVoltage'],
		measuredAs: 'sweep',
		promised: ['minimum', 'maximum'],
		transform: 'ln',
		fallsWithReverseVoltage: true
	},
	{
		key: 'I',
		symbol: { quantity: 'I' },
		name: 'Current',
		unit: 'A',
		axes: ['reverseVoltage'],
		measuredAs: 'sweep',
		promised: [],
		transform: 'identity',
		fallsWithReverseVoltage: false
	},
	{
		key: 'V_F',
		symbol: { quantity: 'V', subscript: 'F' },
		name: 'Forward voltage',
		unit: 'V',
		axes: ['forwardCurrent', 'pulseDuration'],
		measuredAs: 'reading',
		promised: ['maximum'],
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
		promised: ['maximum'],
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
		promised: ['minimum'],
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
		promised: ['maximum'],
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
		promised: ['maximum'],
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
		promised: ['maximum'],
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
		promised: ['maximum'],
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 'C_ratio',
		symbol: { quantity: 'C', subscript: 'ratio' },
		name: 'Capacitance ratio',
		unit: '',
		axes: ['frequency', 'reverseVoltage', 'secondReverseVoltage'],
		measuredAs: 'derived',
		promised: ['minimum', 'maximum'],
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 'Q_C',
		symbol: { quantity: 'Q', subscript: 'C' },
		name: 'Capacitive charge from 0 V',
		unit: 'C',
		axes: ['frequency', 'reverseVoltage'],
		measuredAs: 'derived',
		promised: ['maximum'],
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 'E_C',
		symbol: { quantity: 'E', subscript: 'C' },
		name: 'Capacitive energy from 0 V',
		unit: 'J',
		axes: ['frequency', 'reverseVoltage'],
		measuredAs: 'derived',
		promised: ['maximum'],
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 'Q',
		symbol: { quantity: 'Q' },
		name: 'Quality factor',
		unit: '',
		axes: ['frequency', 'reverseVoltage'],
		measuredAs: 'derived',
		promised: ['minimum'],
		transform: 'ln',
		fallsWithReverseVoltage: false
	},
	{
		key: 'α_C',
		symbol: { quantity: 'α', subscript: 'C' },
		name: 'Temperature coefficient of capacitance',
		unit: '1/K',
		axes: ['frequency', 'reverseVoltage'],
		measuredAs: 'derived',
		promised: ['minimum', 'maximum'],
		transform: 'identity',
		fallsWithReverseVoltage: false
	}
] as const satisfies readonly Characteristic[];

/** The characteristic with this key, or `undefined`. */
export function findCharacteristic(key: string): Characteristic | undefined {
	return CHARACTERISTICS.find((entry) => entry.key === key);
}

/** `C_tot` for its entry: keys are the symbols' plain texts, which the catalogue's test checks. */
export const keyOf = ({ symbol }: Pick<Characteristic, 'symbol'>) => symbolText(symbol);
