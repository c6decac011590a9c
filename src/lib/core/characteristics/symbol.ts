import { z } from 'zod';

/** A letter symbol as IEC 60747-1 sets it: italic quantity, upright subscript. */
export const letterSymbol = z.object({
	quantity: z.string().min(1),
	subscript: z.string().optional()
});
export type LetterSymbol = z.infer<typeof letterSymbol>;

/** `V_R`, `C_tot`: the plain text for screen readers, files and search. */
export function symbolText(symbol: LetterSymbol): string {
	return symbol.subscript === undefined
		? symbol.quantity
		: `${symbol.quantity}_${symbol.subscript}`;
}
