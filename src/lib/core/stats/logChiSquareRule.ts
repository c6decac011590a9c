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
	/** Outwards until they no longer count. */
	const towards = (direction: 1 | -1, first: number) => {
		const [nodes, weights]: [number[], number[]] = [[], []];
		for (let at = first; ; at++) {
			const u = Math.exp(direction * at * step * spread);
			const weight = (step * spread * degrees * prefactor((degrees * u) / 2)) / 2;
			if (at > 0 && !(weight > 1e-11)) return { nodes, weights };
			nodes.push(degrees * u);
			weights.push(weight);
		}
	};
	const [below, above] = [towards(-1, 1), towards(1, 0)];
	return {
		nodes: Float64Array.from([...below.nodes.reverse(), ...above.nodes]),
		weights: Float64Array.from([...below.weights.reverse(), ...above.weights])
	};
}
