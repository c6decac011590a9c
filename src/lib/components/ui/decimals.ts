const NUMBER = /^[+\u2212-]?[\d\u00a0]+(?:\.(\d+))?$/;

/** Digits after the point; 0 for a whole number, and for text that is no number. */
export function decimalsOf(text: string): number {
	return NUMBER.exec(text)?.[1]?.length ?? 0;
}

/** The most digits after the point in a column; `null` stands for a value that isn't there. */
export function columnDecimals(texts: readonly (string | null | undefined)[]): number {
	return texts.reduce((most, text) => Math.max(most, decimalsOf(text ?? '')), 0);
}

/**
 * The unseen digits behind a number, so that the points of a right-aligned column meet: `12.5` in a
 * column of three decimals is padded by `00`, `7` and a missing value by `.000`.
 */
export function paddingAfter(text: string | null, decimals: number): string {
	if (text !== null && !NUMBER.test(text)) return '';
	const missing = decimals - decimalsOf(text ?? '');
	if (missing <= 0) return '';
	return (text?.includes('.') ? '' : '.') + '0'.repeat(missing);
}

/** A number as it is set: U+2212 for minus, an en dash where there is no value. */
export function setNumber(text: string | null): string {
	return text === null ? '\u2013' : text.replace(/^-/, '\u2212');
}
