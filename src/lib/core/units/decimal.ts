/** A decimal number without error: `digits` × 10^`exponent`. */
export interface Decimal {
	readonly digits: bigint;
	readonly exponent: number;
}

const PATTERN = /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d{1,4}))?$/;

/** Reads a decimal as it is written, with a point; `undefined` for anything else. */
export function readDecimal(text: string): Decimal | undefined {
	const [, sign, whole = '', fraction = '', exponent = '0'] = PATTERN.exec(text) ?? [];
	if (sign === undefined || whole.length + fraction.length === 0) return undefined;
	const digits = BigInt(whole + fraction);
	return {
		digits: sign === '-' ? -digits : digits,
		exponent: Number(exponent) - fraction.length
	};
}

/**
 * The decimal a binary number stands for: the shortest one that reads back as the same number, so
 * 0.7 is seven tenths and not 0.69999999999999995559.
 *
 * @throws {RangeError} for NaN and the infinities
 */
export function decimalOf(value: number): Decimal {
	const decimal = readDecimal(String(value));
	if (decimal === undefined)
		throw new RangeError(`a decimal requires a finite number, got ${value}`);
	return decimal;
}

/** The binary number nearest to a decimal. */
export function numberOf({ digits, exponent }: Decimal): number {
	return Number(`${digits}e${exponent}`);
}

/** Both written with the same exponent, the smaller of the two. */
export function aligned(
	a: Decimal,
	b: Decimal
): { readonly a: bigint; readonly b: bigint; readonly exponent: number } {
	const exponent = Math.min(a.exponent, b.exponent);
	return {
		a: a.digits * 10n ** BigInt(a.exponent - exponent),
		b: b.digits * 10n ** BigInt(b.exponent - exponent),
		exponent
	};
}

/** Product, without error. */
export function times(a: Decimal, b: Decimal): Decimal {
	return { digits: a.digits * b.digits, exponent: a.exponent + b.exponent };
}

/** Sum, without error. */
export function plus(a: Decimal, b: Decimal): Decimal {
	const { a: first, b: second, exponent } = aligned(a, b);
	return { digits: first + second, exponent };
}

/** The largest integer k with 10^k ≤ |value|; `undefined` for zero. */
export function magnitude({ digits, exponent }: Decimal): number | undefined {
	if (digits === 0n) return undefined;
	return (digits < 0n ? -digits : digits).toString().length - 1 + exponent;
}

/** Written out with so many decimals; what lies beyond them must be zero. */
export function writeDecimal(value: Decimal, decimals: number): string {
	const { a: digits } = aligned(value, { digits: 0n, exponent: -decimals });
	const excess = Math.max(0, -value.exponent - decimals);
	const kept = digits / 10n ** BigInt(excess);
	const text = (kept < 0n ? -kept : kept).toString().padStart(decimals + 1, '0');
	const whole = text.slice(0, text.length - decimals);
	const fraction = decimals === 0 ? '' : `.${text.slice(text.length - decimals)}`;
	return `${kept < 0n ? '\u2212' : ''}${whole}${fraction}`;
}
