import { normalProbability } from './normalProbability';

/**
 * P(χ²_ν > x) by the recurrence from one or two degrees of freedom,
 * Q(ν + 2) = Q(ν) + (x/2)^(ν/2) e^(−x/2) / Γ(ν/2 + 1), the terms kept as logarithms.
 *
 * Source: Abramowitz and Stegun, 26.4.8.
 */
export function chiSquareBeyond(x: number, freedom: number): number {
	if (x <= 0) return 1;
	const isOdd = freedom % 2 === 1;
	let sum = isOdd ? 2 * normalProbability(-Math.sqrt(x)) : Math.exp(-x / 2);
	const half = Math.log(x / 2);
	// Of the first term: (x/2)^½ e^(−x/2)/Γ(3/2) for odd, (x/2) e^(−x/2)/Γ(2) for even degrees.
	let log = isOdd ? half / 2 - x / 2 - Math.log(Math.sqrt(Math.PI) / 2) : half - x / 2;
	for (let of = isOdd ? 1 : 2; of < freedom; of += 2) {
		sum += Math.exp(log);
		log += half - Math.log(of / 2 + 1);
	}
	return Math.min(1, sum);
}
