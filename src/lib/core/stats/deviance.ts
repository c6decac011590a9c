/**
 * x ln(x/m) + m − x without the cancellation of its terms when x is near m: the exponent of
 * Poisson, gamma and binomial densities.
 *
 * Source: Loader 2000 (see stirlingError), function bd0.
 */
export function deviance(x: number, mean: number): number {
	if (x === 0) return mean;
	if (Math.abs(x - mean) >= 0.1 * (x + mean)) return x * Math.log(x / mean) + mean - x;
	const ratio = (x - mean) / (x + mean);
	const square = ratio * ratio;
	let sum = (x - mean) * ratio;
	let term = 2 * x * ratio;
	for (let k = 3; k < 1000; k += 2) {
		term *= square;
		const next = sum + term / k;
		if (next === sum) break;
		sum = next;
	}
	return sum;
}
