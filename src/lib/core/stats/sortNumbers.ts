/** So many numbers a bucket are put in order by insertion; a fuller one by the language's own sort. */
const CROWDED = 24;

/**
 * `values.toSorted()` in a third of its time where the numbers spread as measured ones do: each goes
 * into one of as many equal intervals as there are numbers, and an interval holds few. Where most
 * fall into one of them, because of an outlier far away, it takes as long as the language's own sort.
 * NaN comes last, −0 before 0.
 */
export function sortNumbers(values: Float64Array): Float64Array {
	const size = values.length;
	if (size <= CROWDED) return values.slice().sort();
	let [lowest, highest] = [Infinity, -Infinity];
	for (let i = 0; i < size; i++) {
		const value = values[i]!;
		if (Number.isNaN(value)) return values.slice().sort();
		if (value < lowest) lowest = value;
		if (value > highest) highest = value;
	}
	const perUnit = (size - 1) / (highest - lowest);

	// Without a finite spread, every place is 0: one crowded bucket.
	const starts = emptyBuckets(size + 1);
	for (let i = 0; i < size; i++) starts[((values[i]! - lowest) * perUnit) | 0]!++;
	for (let bucket = 1; bucket <= size; bucket++) starts[bucket]! += starts[bucket - 1]!;
	const sorted = new Float64Array(size);
	for (let i = size - 1; i >= 0; i--) {
		const value = values[i]!;
		sorted[--starts[((value - lowest) * perUnit) | 0]!] = value;
	}

	/** The comparison of an insertion can't tell −0 from 0. */
	const ofZero = lowest <= 0 && highest >= 0 ? (-lowest * perUnit) | 0 : -1;
	for (let bucket = 0; bucket < size; bucket++) {
		const [from, to] = [starts[bucket]!, starts[bucket + 1]!];
		if (to - from < 2) continue;
		if (to - from > CROWDED || bucket === ofZero) sorted.subarray(from, to).sort();
		else insert(sorted, from, to);
	}
	return sorted;
}

/** Kept from one sample to the next, as long as the largest of them needed. */
let buckets = new Int32Array(0);

function emptyBuckets(count: number): Int32Array {
	if (buckets.length < count) buckets = new Int32Array(count);
	else buckets.fill(0, 0, count);
	return buckets;
}

function insert(values: Float64Array, from: number, to: number): void {
	for (let i = from + 1; i < to; i++) {
		const value = values[i]!;
		let at = i - 1;
		while (at >= from && values[at]! > value) {
			values[at + 1] = values[at]!;
			at--;
		}
		values[at + 1] = value;
	}
}
