/** Nodes in (−1, 1) and their weights. */
export interface QuadratureRule {
	readonly nodes: Float64Array;
	readonly weights: Float64Array;
}

/**
 * The Gauss–Legendre rule of an order: zeros of the Legendre polynomial by Newton's method.
 *
 * Source: Abramowitz and Stegun 25.4.29.
 */
export function gaussLegendre(order: number): QuadratureRule {
	const nodes = new Float64Array(order);
	const weights = new Float64Array(order);
	for (let i = 0; i < order; i++) {
		let x = Math.cos((Math.PI * (i + 0.75)) / (order + 0.5));
		let slope = 0;
		for (let round = 0; round < 100; round++) {
			let [previous, current] = [1, x];
			for (let k = 2; k <= order; k++)
				[previous, current] = [current, ((2 * k - 1) * x * current - (k - 1) * previous) / k];
			slope = (order * (x * current - previous)) / (x * x - 1);
			const step = current / slope;
			x -= step;
			if (Math.abs(step) < 1e-16) break;
		}
		nodes[order - 1 - i] = x;
		weights[order - 1 - i] = 2 / ((1 - x * x) * slope * slope);
	}
	return { nodes, weights };
}

const RULE = gaussLegendre(20);

/** Points and weights of a whole integral: a 20-point rule on every panel between breaks. */
export function panelRule(breaks: readonly number[]): QuadratureRule {
	const panels = breaks.length - 1;
	const order = RULE.nodes.length;
	const nodes = new Float64Array(panels * order);
	const weights = new Float64Array(panels * order);
	for (let p = 0; p < panels; p++) {
		const half = (breaks[p + 1]! - breaks[p]!) / 2;
		const middle = (breaks[p + 1]! + breaks[p]!) / 2;
		for (let i = 0; i < order; i++) {
			nodes[p * order + i] = middle + half * RULE.nodes[i]!;
			weights[p * order + i] = half * RULE.weights[i]!;
		}
	}
	return { nodes, weights };
}
