import { normalSource, type RandomSource } from '$lib/core/stats/randomSource';

/** Draws that a simulated sample is made of. */
export interface Draws {
	readonly normal: RandomSource;
	/** A chi-square of whole degrees of freedom; 0 for none. */
	readonly chiSquare: (degrees: number) => number;
}

/**
 * Normal and chi-square draws from one source. Chi-squares by Marsaglia and Tsang 2000: a cube of a
 * normal, accepted by comparison with the exact density.
 */
export function drawsFrom(random: RandomSource): Draws {
	const normal = normalSource(random);
	const chiSquare = (degrees: number): number => {
		if (degrees === 0) return 0;
		if (degrees === 1) return normal() ** 2;
		const d = degrees / 2 - 1 / 3;
		const c = 1 / Math.sqrt(9 * d);
		for (;;) {
			const x = normal();
			const v = (1 + c * x) ** 3;
			if (v <= 0) continue;
			if (Math.log(1 - random()) < (x * x) / 2 + d - d * v + d * Math.log(v)) return 2 * d * v;
		}
	};
	return { normal, chiSquare };
}
