import { aligned, decimalOf, readDecimal, writeDecimal, type Decimal } from '../units/decimal';

/** A text that isn't a plain decimal number. */
export class NotADecimalError extends Error {
	override readonly name = 'NotADecimalError';

	constructor(readonly text: string) {
		super(`printed numbers require decimal digits, got "${text}"`);
	}
}

/** Reads `−12.50` as it is printed: a typographic minus, no-break spaces between thousands. */
function parse(text: string): Decimal {
	const read = readDecimal(text.replace('−', '-').replaceAll('\u00a0', ''));
	if (read === undefined) throw new NotADecimalError(text);
	return read;
}

/** Moves the decimal point: `shiftDecimal('1.25', 3)` is `1250`, every digit kept. */
export function shiftDecimal(text: string, by: number): string {
	const { digits, exponent } = parse(text);
	return writeDecimal({ digits, exponent: exponent + by }, Math.max(0, -exponent - by));
}

/** −1, 0 or 1 as `one` is below, at or above `other`, without a binary fraction in between. */
export function compareDecimals(one: string, other: string): -1 | 0 | 1 {
	const { a, b } = aligned(parse(one), parse(other));
	return a < b ? -1 : a > b ? 1 : 0;
}

/**
 * How far `text` lies from `reference` in %, to one decimal, with its sign: `−9.2`, `+10.2`, `0.0`.
 * `null` for a reference of zero.
 */
export function deviationPercent(text: string, reference: string): string | null {
	const { a, b } = aligned(parse(text), parse(reference));
	if (b === 0n) return null;
	const tenths = toNearest((a - b) * 1000n, b);
	const written = writeDecimal({ digits: tenths, exponent: -1 }, 1);
	return tenths > 0n ? `+${written}` : written;
}

/** `text` / `reference` to three significant figures: `14.8`, `1.00`. `null` when either is zero. */
export function ratioText(text: string, reference: string): string | null {
	const { a, b } = aligned(parse(text), parse(reference));
	if (a === 0n || b === 0n) return null;
	for (let places = 12; places > 0; places -= 1) {
		const digits = toNearest(a * 10n ** BigInt(places), b);
		if (size(digits) < 1000n) return writeDecimal({ digits, exponent: -places }, places);
	}
	return writeDecimal({ digits: toNearest(a, b), exponent: 0 }, 0);
}

/**
 * Rounds a rating so that it claims less: towards zero, in whole steps. A maximum of 30.7 V in
 * steps of 1 is 30, a minimum of −55.5 °C is −55.
 */
export function roundRating(text: string, step: number): string {
	const unit = decimalOf(step);
	const { a, b, exponent } = aligned(parse(text), unit);
	return writeDecimal({ digits: (a / b) * b, exponent }, Math.max(0, -unit.exponent));
}

const size = (digits: bigint): bigint => (digits < 0n ? -digits : digits);

/** n / d as a whole number, halves away from zero. */
function toNearest(numerator: bigint, denominator: bigint): bigint {
	const isNegative = numerator < 0n !== denominator < 0n;
	const [n, d] = [size(numerator), size(denominator)];
	const rounded = (2n * n + d) / (2n * d);
	return isNegative ? -rounded : rounded;
}
