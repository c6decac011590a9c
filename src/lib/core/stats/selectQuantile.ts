import { SampleTooSmallError } from './errors';

/**
 * The quantile of `quantile` without sorting everything: the values are rearranged in place
 * only as far as the two about the quantile need. For simulations that ask for one quantile of many
 * thousand values.
 *
 * Source: Hoare 1961, algorithm 65, FIND, with the median of three as pivot.
 *
 * @throws {SampleTooSmallError} for no values
 */
export function selectQuantile(values: Float64Array, probability: number): number {
	const size = values.length;
	if (size === 0) throw new SampleTooSmallError('selectQuantile', 1, 0);
	/** Position of the type-8 quantile, from 0. */
	const position = (size + 1 / 3) * probability + 1 / 3 - 1;
	const at = Math.min(Math.max(Math.floor(position), 0), size - 1);
	partition(values, at);
	let next = Infinity;
	for (let i = at + 1; i < size; i++) if (values[i]! < next) next = values[i]!;
	if (at + 1 >= size || position <= 0) return values[at]!;
	return values[at]! + (position - at) * (next - values[at]!);
}

/** Puts the value that belongs at a place there, smaller ones before and larger ones behind it. */
function partition(values: Float64Array, place: number): void {
	let [from, to] = [0, values.length - 1];
	while (from < to) {
		const pivot = medianOfThree(values[from]!, values[(from + to) >> 1]!, values[to]!);
		let [i, j] = [from, to];
		while (i <= j) {
			while (values[i]! < pivot) i++;
			while (values[j]! > pivot) j--;
			if (i > j) break;
			const held = values[i]!;
			values[i] = values[j]!;
			values[j] = held;
			i++;
			j--;
		}
		if (place <= j) to = j;
		else if (place >= i) from = i;
		else return;
	}
}

function medianOfThree(a: number, b: number, c: number): number {
	return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}
