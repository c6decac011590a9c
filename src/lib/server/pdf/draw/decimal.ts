/** A number as an operand: hundredths of a point are enough, no exponent, no trailing zeros. */
export function decimal(value: number): string {
	const rounded = Math.round(value * 100) / 100;
	return Object.is(rounded, -0) ? '0' : String(rounded);
}
