import type { LetterSymbol } from '../characteristics/symbol';
import type { Basis } from '../limits/basis';
import type { PolicyVersion } from '../limits/policy';
import type { SlotView } from './resolveInput';

/** A slot with all that its section, the notes and the checks need to know of it. */
export interface Place extends SlotView {
	/** What it can be called by in a text: `C_tot`, `V_R`. */
	readonly name: string;
	readonly symbol: LetterSymbol;
	readonly title: string;
	readonly conditions: string;
	readonly temperatureCelsius: number | null;
	readonly frequency: number | null;
	readonly reverseVoltage: number | null;
	/** What stands behind a printed limit, and the policy that computed it. */
	readonly basis: Basis | null;
	readonly policy: PolicyVersion | null;
	/** The unit the template has it in, and the size in SI of the unit it prints in. */
	readonly unit: string;
	readonly unitScale: number;
	readonly trace: string | null;
	readonly sampleSize: number;
	readonly independentLots: number;
}

/** Whether it prints anything at all. */
export function isPrinted({ state, prints }: Place): boolean {
	return (
		state !== 'struck out' &&
		prints !== null &&
		(prints.minimum !== null || prints.typical !== null || prints.maximum !== null)
	);
}

/** `C_tot at V_R = 4 V`. */
export function placeLabel(name: string, conditions: string): string {
	return conditions === '' ? name : `${name} at ${conditions}`;
}
