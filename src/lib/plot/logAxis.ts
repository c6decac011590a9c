/** A logarithmic axis as it is printed: its ends, every grid line, and which lines carry a label. */
export interface LogAxis {
	readonly domain: readonly [number, number];
	readonly lines: readonly number[];
	readonly decades: readonly number[];
	readonly labels: readonly number[];
}

/** A digit times a power of ten, without the noise of a binary product: 3 × 10⁻¹ is 0.3. */
const decimal = (digit: number, exponent: number) => Number(`${digit}e${exponent}`);

/** The smallest digit × decade at or above a positive value: where an axis ends well. */
export function wholeDigitAbove(value: number): number {
	const exponent = Math.floor(Math.log10(value));
	const digits = [1, 2, 3, 4, 5, 6, 7, 8, 9, 10].map((digit) => decimal(digit, exponent));
	return digits.find((line) => line >= value) ?? value;
}

/** The largest digit × decade at or below a positive value: where an axis begins well. */
export function wholeDigitBelow(value: number): number {
	const exponent = Math.floor(Math.log10(value));
	const digits = [9, 8, 7, 6, 5, 4, 3, 2, 1].map((digit) => decimal(digit, exponent));
	return digits.find((line) => line <= value) ?? value;
}

/** Which digits of a decade are labelled, so that labels stay apart over so many decades. */
function labelledDigits(decades: number): readonly number[] {
	if (decades <= 2) return [1, 2, 3, 5];
	if (decades <= 3.5) return [1, 2, 5];
	return [1];
}

/**
 * An axis from `lowest` to `highest`, both positive. Lines stand at 1 to 9 of each decade, because a
 * value is read off between them.
 */
export function logAxis(lowest: number, highest: number): LogAxis {
	const span = Math.log10(highest / lowest);
	const first = Math.floor(Math.log10(lowest));
	const last = Math.floor(Math.log10(highest));
	const each = (digits: readonly number[]) =>
		Array.from({ length: last - first + 1 }, (_, step) => first + step)
			.flatMap((exponent) => digits.map((digit) => decimal(digit, exponent)))
			.filter((value) => value >= lowest && value <= highest);

	return {
		domain: [lowest, highest],
		lines: each(span > 4 ? [1, 2, 5] : [1, 2, 3, 4, 5, 6, 7, 8, 9]),
		decades: each([1]),
		labels: each(labelledDigits(span))
	};
}
