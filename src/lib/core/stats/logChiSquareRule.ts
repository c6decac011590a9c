import { gammaPrefactor } from './incompleteGamma';
import type { QuadratureRule } from './gaussLegendre';

/**
 * Nodes U and weights of an expectation over chi-square, by the trapezoid rule in ln U: the
 * integrand falls off at both ends, and the plain rule then converges faster than any power.
 *
 * @param step - spacing in standard deviations of ln U
 */
export function logChiSquareRule(degrees: number, step: number): QuadratureRule {
	const spread = Math.sqrt(2 / degrees + 1 / (degrees * degrees));
	const prefactor = gammaPrefactor(degrees / 2);
	const weightAt = (u: number) => (step * spread * degrees * prefactor((degrees * u) / 2)) / 2;
	const reach = (direction: number) => {
		let count = 0;
		while (weightAt(Math.exp(direction * (count + 1) * step * spread)) > 1e-11) count++;
		return count;
	};
	const below = reach(-1);
	const count = below + reach(1) + 1;
	const nodes = new Float64Array(count);
	const weights = new Float64Array(count);
	for (let i = 0; i < count; i++) {
		const u = Math.exp((i - below) * step * spread);
		nodes[i] = degrees * u;
		weights[i] = weightAt(u);
	}
	return { nodes, weights };
}
