const MINUS = '\u2212';

/** A number with so many decimals, and a true minus sign. */
export function fixed(value: number, decimals: number): string {
	return value.toFixed(decimals).replace('-', MINUS);
}

/** A number with so many significant figures, never in powers of ten. */
export function significant(value: number, figures: number): string {
	return fixed(value, decimalsFor(value, figures));
}

/** The decimals that show so many significant figures of a value. */
export function decimalsFor(value: number, figures: number): number {
	if (value === 0) return 0;
	return Math.min(100, Math.max(0, figures - 1 - Math.floor(Math.log10(Math.abs(value)))));
}

/** What `fixed` and `significant` wrote, read back. */
export function readDigits(text: string): number {
	return Number(text.replace(MINUS, '-'));
}

/** A share as it is spoken of: 0.003 is `0.3 %`. */
export function percent(share: number): string {
	return `${Number((share * 100).toPrecision(6))}\u00a0%`;
}

/** `p = 0.041`, or `p < 0.0001` where more digits would mean nothing. */
export function pValue(p: number): string {
	return p < 0.0001 ? 'p\u00a0<\u00a00.0001' : `p\u00a0=\u00a0${significant(p, 2)}`;
}

/**
 * What lies beyond the twelfth digit is noise of the arithmetic. Left in, exp(ln 12.5) would be
 * 12.499999999999998 and be rounded down to 12.4.
 */
export function withoutNoise(value: number): number {
	return Number(value.toPrecision(12));
}
