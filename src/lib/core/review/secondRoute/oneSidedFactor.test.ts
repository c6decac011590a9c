import { expect, it } from 'vitest';
import { normalPoint, normalProbability } from './normalProbability';
import { oneSidedFactor } from './oneSidedFactor';

// SciPy 1.x: scipy.stats.nct.ppf(confidence, n - 1, norm.ppf(content) * sqrt(n)) / sqrt(n)
it.each([
	[2, 0.9, 0.95, 20.581467624244947],
	[3, 0.95, 0.95, 7.655900133153338],
	[10, 0.99, 0.95, 3.9811178452730585],
	[30, 0.9, 0.9, 1.6570649131303767],
	[300, 0.95, 0.95, 1.7996419304741287],
	[417, 0.95, 0.975, 1.8007820953179314],
	[30000, 0.99, 0.95, 2.3447468067399933]
])('agrees with the noncentral t quantile for %i devices', (n, content, confidence, factor) => {
	expect(oneSidedFactor(n, { content, confidence }) / factor).toBeCloseTo(1, 10);
});

// SciPy: scipy.stats.norm.cdf(x)
it.each([
	[0, 0.5],
	[1.96, 0.9750021048517795],
	[-3, 0.0013498980316300933],
	[6, 0.9999999990134123]
])('gives Φ(%f)', (x, probability) => {
	expect(normalProbability(x)).toBeCloseTo(probability, 13);
});

// SciPy: scipy.stats.norm.ppf(0.95)
it('finds the normal point by halving', () => {
	expect(normalPoint(0.95)).toBeCloseTo(1.6448536269514722, 12);
});
