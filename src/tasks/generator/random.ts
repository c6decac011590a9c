/**
 * A stream of random numbers that is the same everywhere for the same seed: mulberry32, a 32-bit
 * generator by Tommy Ettinger in the public domain. Good enough for demo data, not for statistics
 * that anybody relies on.
 */
export class Random {
	#state: number;
	#spare: number | undefined;

	constructor(seed: number) {
		this.#state = seed >>> 0;
	}

	/** Evenly between 0 (included) and 1 (excluded). */
	uniform(): number {
		this.#state = (this.#state + 0x6d2b79f5) >>> 0;
		let mixed = this.#state;
		mixed = Math.imul(mixed ^ (mixed >>> 15), mixed | 1);
		mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
		return ((mixed ^ (mixed >>> 14)) >>> 0) / 2 ** 32;
	}

	/** Normal with mean 0 and standard deviation 1, by the method of Box and Muller. */
	normal(): number {
		if (this.#spare !== undefined) {
			const spare = this.#spare;
			this.#spare = undefined;
			return spare;
		}
		const radius = Math.sqrt(-2 * Math.log(1 - this.uniform()));
		const angle = 2 * Math.PI * this.uniform();
		this.#spare = radius * Math.sin(angle);
		return radius * Math.cos(angle);
	}
}
