/** A stretch of a text: plain words, or a letter symbol within them. */
export type Run =
	| { readonly kind: 'text'; readonly text: string }
	| { readonly kind: 'symbol'; readonly quantity: string; readonly subscript: string };

/** `V_R`, `C_tot`, `V_(BR)`, `R_th(j-a)`, `T_j`: letters, an underscore, a subscript. */
const SYMBOL = /(\p{L}+)_((?:[\p{L}\p{N}]+|\([^()\s]+\))(?:\([^()\s]+\))?)/gu;

/** Finds the letter symbols written in a plain text: `V_R = 4 V` is a symbol and ` = 4 V`. */
export function symbolRuns(text: string): Run[] {
	const runs: Run[] = [];
	let done = 0;
	for (const match of text.matchAll(SYMBOL)) {
		if (match.index > done) runs.push({ kind: 'text', text: text.slice(done, match.index) });
		runs.push({ kind: 'symbol', quantity: match[1] ?? '', subscript: match[2] ?? '' });
		done = match.index + match[0].length;
	}
	if (done < text.length) runs.push({ kind: 'text', text: text.slice(done) });
	return runs;
}
