import type { PrintedNumber } from './document';

const NO_BREAK_SPACE = '\u00a0';
const MINUS = '−';

/**
 * A number as it stands on paper, and in SI. Digits are kept as they are; the minus becomes the
 * typographic one, and thousands part from five figures on.
 */
export function printNumber(text: string, unitScale: number): PrintedNumber {
	const plain = text.replace(MINUS, '-').replaceAll(NO_BREAK_SPACE, '');
	return { text: groupThousands(plain.replace('-', MINUS)), value: inSi(plain, unitScale) };
}

/** The decimal point is moved in the text: 10.9 pF is 1.09e-11, where 10.9 × 1e-12 is not quite. */
function inSi(plain: string, unitScale: number): number {
	return Number(`${plain}e${Math.round(Math.log10(unitScale))}`);
}

export function printOptional(text: string | null, unitScale: number): PrintedNumber | null {
	return text === null ? null : printNumber(text, unitScale);
}

function groupThousands(text: string): string {
	const [whole = '', fraction] = text.split('.');
	const digits = whole.replace(MINUS, '');
	const grouped = digits.length < 5 ? whole : whole.replace(/\B(?=(\d{3})+$)/g, NO_BREAK_SPACE);
	return fraction === undefined ? grouped : `${grouped}.${fraction}`;
}

/** A number with its unit, held together: `4 V`, `1 MHz`. */
export function withUnit(text: string, unit: string): string {
	return `${text.replace('-', MINUS)}${NO_BREAK_SPACE}${unit}`;
}

const PREFIXES = [
	[1e9, 'G'],
	[1e6, 'M'],
	[1e3, 'k'],
	[1, ''],
	[1e-3, 'm'],
	[1e-6, 'µ'],
	[1e-9, 'n'],
	[1e-12, 'p']
] as const;

/** A value of a condition in the unit a reader expects: 1 000 000 Hz is `1 MHz`. */
export function engineeringText(value: number, unit: string): string {
	const [scale, prefix] = PREFIXES.find(([size]) => Math.abs(value) >= size) ?? [1, ''];
	return withUnit(String(Number((value / scale).toPrecision(12))), `${prefix}${unit}`);
}
