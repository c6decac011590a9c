/** Numbers in [0, 1), each call the next. */
export type RandomSource = () => number;

/**
 * A seeded source: the same seed gives the same numbers on every machine. Core reads no randomness
 * of its own; whoever simulates passes one of these in and states the seed.
 *
 * Source: xoshiro128++ of Blackman and Vigna 2021, its state filled by a Weyl sequence with a
 * multiplicative finish.
 */
export function randomSource(seed: number): RandomSource {
	let filler = seed >>> 0;
	const next = () => {
		filler = (filler + 0x9e3779b9) >>> 0;
		let word = filler;
		word = Math.imul(word ^ (word >>> 16), 0x85ebca6b);
		word = Math.imul(word ^ (word >>> 13), 0xc2b2ae35);
		return (word ^ (word >>> 16)) >>> 0;
	};
	let [a, b, c, d] = [next(), next(), next(), next()];
	const rotate = (word: number, by: number) => ((word << by) | (word >>> (32 - by))) >>> 0;
	return () => {
		const result = (rotate((a + d) >>> 0, 7) + a) >>> 0;
		const shifted = (b << 9) >>> 0;
		c ^= a;
		d ^= b;
		b ^= c;
		a ^= d;
		c ^= shifted;
		d = rotate(d >>> 0, 11);
		[a, b, c] = [a >>> 0, b >>> 0, c >>> 0];
		return result / 4294967296;
	};
}

/** Standard normal draws from a source, by Marsaglia's polar method. */
export function normalSource(random: RandomSource): RandomSource {
	let spare: number | undefined;
	return () => {
		if (spare !== undefined) {
			const value = spare;
			spare = undefined;
			return value;
		}
		for (;;) {
			const x = 2 * random() - 1;
			const y = 2 * random() - 1;
			const square = x * x + y * y;
			if (square === 0 || square >= 1) continue;
			const scale = Math.sqrt((-2 * Math.log(square)) / square);
			spare = y * scale;
			return x * scale;
		}
	};
}
