import { symbolText, type LetterSymbol } from './symbol';

/** What is measured or computed of a device, as tables, templates and files name it. */
export interface Characteristic {
	/** The plain text of its symbol: distributions and templates refer to it by this. */
	readonly key: string;
	readonly symbol: LetterSymbol;
	readonly name: string;
	/** SI unit of the stored values. */
	readonly unit: string;
	/** What its value depends on, beside the junction temperature. */
	readonly axes: readonly ('frequency' | 'reverseVoltage')[];
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
		transform: 'ln',
		fallsWithReverseVoltage: true
	}
] as const satisfies readonly Characteristic[];

/** The characteristic with this key, or `undefined`. */
export function findCharacteristic(key: string): Characteristic | undefined {
	return CHARACTERISTICS.find((entry) => entry.key === key);
}

/** `C_tot` for its entry: keys are the symbols' plain texts, which the catalogue's test checks. */
export const keyOf = ({ symbol }: Pick<Characteristic, 'symbol'>) => symbolText(symbol);
