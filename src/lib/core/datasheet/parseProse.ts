import type { Part } from './boundTexts';

/** What an inline binding asks for. */
export interface Reference {
	/** `C_tot`, or the symbol of a rating. */
	readonly name: string;
	readonly reverseVoltage: number | null;
	readonly frequency: number | null;
	/** `null` where none is written: 25 °C for a characteristic. */
	readonly temperatureCelsius: number | null;
	readonly part: Part;
}

/** A piece of typed text, with where it starts, counted in characters from 0. */
export type ProseToken =
	| { readonly kind: 'text'; readonly text: string; readonly position: number }
	| {
			readonly kind: 'reference';
			readonly text: string;
			readonly reference: Reference;
			readonly position: number;
	  }
	| {
			readonly kind: 'unread';
			readonly text: string;
			readonly isOpen: boolean;
			readonly position: number;
	  };

const PARTS: Readonly<Record<string, Part>> = { min: 'minimum', typ: 'typical', max: 'maximum' };
const PREFIXES: Readonly<Record<string, number>> = { '': 1, k: 1e3, M: 1e6, G: 1e9 };

const REFERENCE = /^\{\s*([^\s@:{}]+)\s*(?:@([^:{}]*))?:\s*(min|typ|max)\s*\}$/;
const CONDITION = /^(V_R|T_j|f)\s*=\s*([-−]?\d+(?:\.\d+)?)\s*(V|°C|C|[kMG]?Hz)$/;

/**
 * Takes a text apart into words and inline bindings such as `{C_tot @ V_R=4 V, T_j=85 °C : typ}`.
 * Joined again, the tokens' texts are the text. What stands in braces and can't be read is a token
 * of its own, never dropped.
 */
export function parseProse(text: string): ProseToken[] {
	const tokens: ProseToken[] = [];
	let from = 0;
	while (from < text.length) {
		const open = text.indexOf('{', from);
		if (open !== from) {
			const end = open === -1 ? text.length : open;
			tokens.push({ kind: 'text', text: text.slice(from, end), position: from });
			from = end;
			continue;
		}
		const close = text.indexOf('}', open);
		const end = close === -1 ? text.length : close + 1;
		tokens.push(bracedToken(text.slice(open, end), open, close === -1));
		from = end;
	}
	return tokens;
}

function bracedToken(text: string, position: number, isOpen: boolean): ProseToken {
	const reference = isOpen ? undefined : readReference(text);
	return reference === undefined
		? { kind: 'unread', text, isOpen, position }
		: { kind: 'reference', text, reference, position };
}

function readReference(text: string): Reference | undefined {
	const [, name, conditions, word = ''] = REFERENCE.exec(text) ?? [];
	const part = PARTS[word];
	if (name === undefined || part === undefined) return undefined;
	const read = conditions === undefined ? {} : readConditions(conditions);
	if (read === undefined) return undefined;
	return { name, reverseVoltage: null, frequency: null, temperatureCelsius: null, ...read, part };
}

type Conditions = Partial<Pick<Reference, 'reverseVoltage' | 'frequency' | 'temperatureCelsius'>>;

function readConditions(text: string): Conditions | undefined {
	const read: { -readonly [K in keyof Conditions]: Conditions[K] } = {};
	for (const entry of text.split(',')) {
		const [, symbol, digits = '', unit = ''] = CONDITION.exec(entry.trim()) ?? [];
		const value = Number(digits.replace('−', '-'));
		if (symbol === 'V_R' && unit === 'V' && read.reverseVoltage === undefined)
			read.reverseVoltage = value;
		else if (symbol === 'T_j' && unit.endsWith('C') && read.temperatureCelsius === undefined)
			read.temperatureCelsius = value;
		else if (symbol === 'f' && unit.endsWith('Hz') && read.frequency === undefined)
			read.frequency = value * (PREFIXES[unit.slice(0, -2)] ?? 1);
		else return undefined;
	}
	return read;
}
