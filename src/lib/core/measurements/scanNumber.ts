const POWERS = Array.from({ length: 23 }, (_, power) => Number(`1e${power}`));
const [PLUS, MINUS, ZERO, NINE, UPPER_E, LOWER_E] = [0x2b, 0x2d, 0x30, 0x39, 0x45, 0x65];

/**
 * Reads plain decimal numbers out of bytes without making text of them. Up to fifteen digits and
 * powers of ten up to 10²² are exact in binary, so one division or product rounds as correctly as
 * the parser of the language does (Clinger 1990). Anything else is left to the slow path.
 */
export class NumberScanner {
	/** The number read last. */
	value = 0;
	/** Its decimals: 2 for `12.50`, 13 for `1.25e-11`, −3 for `5e3`. */
	decimals = 0;

	/** @param mark byte of the decimal mark */
	constructor(readonly mark: number) {}

	/** Reads the whole range; `false` when it isn't a number of the plain form. */
	scan(bytes: Uint8Array, from: number, to: number): boolean {
		let at = from;
		const first = bytes[at];
		const isNegative = first === MINUS;
		if (isNegative || first === PLUS) at += 1;

		let mantissa = 0;
		let digits = 0;
		let fraction = 0;
		let isFraction = false;
		for (; at < to; at++) {
			const byte = bytes[at]!;
			if (byte >= ZERO && byte <= NINE) {
				mantissa = mantissa * 10 + (byte - ZERO);
				digits += 1;
				if (isFraction) fraction += 1;
			} else if (byte === this.mark && !isFraction) {
				isFraction = true;
			} else {
				break;
			}
		}
		if (digits === 0 || digits > 15) return false;

		let exponent = 0;
		if (at < to) {
			const byte = bytes[at]!;
			if (byte !== UPPER_E && byte !== LOWER_E) return false;
			const read = readExponent(bytes, at + 1, to);
			if (read === undefined) return false;
			exponent = read;
		}
		const power = exponent - fraction;
		if (power < -22 || power > 22) return false;
		const size = power < 0 ? mantissa / POWERS[-power]! : mantissa * POWERS[power]!;
		this.value = isNegative ? -size : size;
		this.decimals = fraction - exponent;
		return true;
	}
}

function readExponent(bytes: Uint8Array, from: number, to: number): number | undefined {
	let at = from;
	const isNegative = bytes[at] === MINUS;
	if (isNegative || bytes[at] === PLUS) at += 1;
	if (at >= to || to - at > 4) return undefined;
	let exponent = 0;
	for (; at < to; at++) {
		const byte = bytes[at]!;
		if (byte < ZERO || byte > NINE) return undefined;
		exponent = exponent * 10 + (byte - ZERO);
	}
	return isNegative ? -exponent : exponent;
}

/** The decimals of a number that `readNumber` reads, from its text. */
export function decimalsIn(text: string): number {
	const [mantissa = '', exponent = '0'] = text.trim().toLowerCase().split('e');
	const [, fraction = ''] = mantissa.split(/[.,]/);
	return fraction.length - Number(exponent);
}
