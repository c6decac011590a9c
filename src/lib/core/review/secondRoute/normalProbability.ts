/** Beyond this many standard deviations the rest is below 1e-17: nothing that a double could add to 1. */
const FAR = 8.5;

/**
 * Φ(x) by Marsaglia's power series, ½ + φ(x)·(x + x³/3 + x⁵/(3·5) + …), absolute error below 1e-14.
 * Written apart from `core/stats` on purpose: the verification sheet must not share its errors.
 * Source: G. Marsaglia, *Evaluating the Normal Distribution*, J. Stat. Software 11 (4), 2004.
 */
export function normalProbability(x: number): number {
	if (x > FAR) return 1;
	if (x < -FAR) return 0;
	let term = x;
	let sum = x;
	for (let odd = 3; Math.abs(term) > 1e-18 * Math.abs(sum); odd += 2) {
		term *= (x * x) / odd;
		sum += term;
	}
	return 0.5 + (sum * Math.exp((-x * x) / 2)) / Math.sqrt(2 * Math.PI);
}

/** z with Φ(z) = probability, by halving an interval until a double can't be halved. */
export function normalPoint(probability: number): number {
	let [low, high] = [-FAR, FAR];
	for (let step = 0; step < 80; step++) {
		const middle = (low + high) / 2;
		if (normalProbability(middle) < probability) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}
