import type { LetterSymbol } from '../characteristics/symbol';
import type { RichText, TextRun } from './document';

/**
 * A quantity with a subscript (`V_R`, `V_(BR)`, `R_th(j-a)`), or a bare *f* or *t* before a relation.
 * The subscript ends where letters, digits and its own parentheses end.
 */
const SYMBOL =
	/(?<![A-Za-z_])(?:([A-Za-zΑ-Ωα-ω])_([A-Za-z0-9]*(?:\([A-Za-z0-9-]+\))?)|([ft])(?= [=≤≥]))/g;

/** Sets the symbols of a plain text: `V_R = 4 V` becomes a symbol and the rest. */
export function symbolRuns(text: string): RichText {
	const runs: TextRun[] = [];
	let from = 0;
	for (const match of text.matchAll(SYMBOL)) {
		const [all, quantity, subscript = '', bare] = match;
		if (bare === undefined && subscript === '') continue;
		if (match.index > from) runs.push({ kind: 'text', text: text.slice(from, match.index) });
		runs.push({ kind: 'symbol', symbol: letterSymbolOf(bare ?? quantity ?? '', subscript) });
		from = match.index + all.length;
	}
	if (from < text.length) runs.push({ kind: 'text', text: text.slice(from) });
	return runs;
}

function letterSymbolOf(quantity: string, subscript: string): LetterSymbol {
	return subscript === '' ? { quantity } : { quantity, subscript };
}
