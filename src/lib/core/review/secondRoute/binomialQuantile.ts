/**
 * Smallest count that a binomial number stays at or below with this probability. The terms are
 * built outwards from the most likely count, relative to it, so that nothing underflows for tens of
 * thousands of trials.
 */
export function binomialQuantile(probability: number, trials: number, share: number): number {
	if (share <= 0) return 0;
	if (share >= 1) return trials;
	const odds = share / (1 - share);
	const mode = Math.min(trials, Math.floor((trials + 1) * share));
	const weights = new Float64Array(trials + 1);
	weights[mode] = 1;
	for (let count = mode; count < trials; count++)
		weights[count + 1] = ((weights[count] ?? 0) * odds * (trials - count)) / (count + 1);
	for (let count = mode; count > 0; count--)
		weights[count - 1] = ((weights[count] ?? 0) * count) / (odds * (trials - count + 1));

	const whole = weights.reduce((sum, weight) => sum + weight, 0);
	let sum = 0;
	for (const [count, weight] of weights.entries()) {
		sum += weight;
		if (sum >= probability * whole) return count;
	}
	return trials;
}
