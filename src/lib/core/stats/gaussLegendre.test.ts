import { expect, it } from 'vitest';
import { gaussLegendre, panelRule } from './gaussLegendre';

// Abramowitz and Stegun, table 25.4, n = 5
it('has the five-point rule of the handbook', () => {
	const { nodes, weights } = gaussLegendre(5);
	expect(nodes[4]).toBeCloseTo(0.906179845938664, 15);
	expect(weights[4]).toBeCloseTo(0.236926885056189, 15);
	expect(weights[2]).toBeCloseTo(0.568888888888889, 15);
});

it('integrates over panels', () => {
	const { nodes, weights } = panelRule([0, 0.5, 2, Math.PI]);
	const area = nodes.reduce((sum, x, i) => sum + Math.sin(x) * weights[i]!, 0);
	expect(area).toBeCloseTo(2, 14);
});
