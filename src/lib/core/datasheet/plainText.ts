import { symbolText } from '../characteristics/symbol';
import type { RichText } from './document';

/** A run of text as plain characters: symbols as `V_R`, bound values as they are printed. */
export function plainText(runs: RichText): string {
	return runs.map((run) => (run.kind === 'symbol' ? symbolText(run.symbol) : run.text)).join('');
}
