/** A number as an operand: at most three decimals, no exponent, no trailing zeros. */
export function decimal(value: number): string {
	const rounded = Math.round(value * 1000) / 1000;
	return Object.is(rounded, -0) ? '0' : String(rounded);
}
