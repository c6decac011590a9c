export type DecimalMark = '.' | ',';

const NUMBER = {
	'.': /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,4})?$/,
	',': /^[+-]?(?:\d+,?\d*|,\d+)(?:[eE][+-]?\d{1,4})?$/
} as const satisfies Record<DecimalMark, RegExp>;

/**
 * A number as a tester writes it. Nothing is repaired: grouped thousands, words such as `NaN` and
 * `inf`, units behind the number and empty fields give `undefined`.
 */
export function readNumber(text: string, decimalMark: DecimalMark = '.'): number | undefined {
	const bare = text.trim().replace(/^\u2212/, '-');
	if (!NUMBER[decimalMark].test(bare)) return undefined;
	const value = Number(decimalMark === ',' ? bare.replace(',', '.') : bare);
	return Number.isFinite(value) ? value : undefined;
}
