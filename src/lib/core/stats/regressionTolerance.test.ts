import fc from 'fast-check';
import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { lineFromMoments } from './regressionLine';
import {
	edgeRule,
	heightVariance,
	oneSidedRegressionFactor,
	twoSidedRegressionFactor
} from './regressionTolerance';
import { oneSidedToleranceFactor } from './toleranceFactor';

const PROMISE = { content: 0.99, confidence: 0.95 };
const line = (correlation: number) =>
	lineFromMoments({
		sampleSize: 60,
		meanX: 0,
		meanY: 0,
		deviationX: 1,
		deviationY: 1,
		correlation
	});

it('is a tolerance factor with one degree less at the mean of x', () => {
	// n = 60: d² = 1/60 and 58 degrees; the sample factor has 59
	const factor = oneSidedRegressionFactor(line(0.9), 0, PROMISE);
	expect(heightVariance(line(0.9), 0)).toBeCloseTo(1 / 60, 14);
	expect(factor).toBeGreaterThan(oneSidedToleranceFactor(60, PROMISE));
	expect(factor).toBeLessThan(oneSidedToleranceFactor(59, PROMISE));
	expect(twoSidedRegressionFactor(line(0.9), 0, PROMISE)).toBeGreaterThan(factor);
});

it('holds each limit at its own edge, and swaps the edges of a falling line', () => {
	const window = { lowest: -1.5, highest: 2 };
	const rising = edgeRule(line(0.9), window, PROMISE);
	expect([rising.minimumEdge, rising.maximumEdge]).toEqual([-1.5, 2]);
	const residual = line(0.9).residualDeviation;
	expect(rising.maximum).toBeCloseTo(0.9 * 2 + (rising.maximumFactor ?? 0) * residual, 12);
	const falling = edgeRule(line(-0.9), window, PROMISE);
	expect([falling.minimumEdge, falling.maximumEdge]).toEqual([2, -1.5]);
	expect(falling.minimum).toBeCloseTo(-(rising.maximum ?? 0), 10);
});

it('gives no limit on the side whose edge is open', () => {
	const { minimum, maximum } = edgeRule(line(0.9), { highest: 2 }, PROMISE);
	expect(minimum).toBeUndefined();
	expect(maximum).toBeGreaterThan(1.8);
});

it('widens with the window, whatever the line', () => {
	const edge = fc.double({ min: 0, max: 3, noNaN: true });
	const correlation = fc.double({ min: -0.99, max: 0.99, noNaN: true });
	fc.assert(
		fc.property(edge, edge, correlation, (a, b, rho) => {
			const [near, far] = [Math.min(a, b) + 0.1, Math.max(a, b) + 0.2];
			const inner = edgeRule(line(rho), { lowest: -near, highest: near }, PROMISE);
			const outer = edgeRule(line(rho), { lowest: -far, highest: far }, PROMISE);
			expect(outer.maximum ?? 0).toBeGreaterThanOrEqual((inner.maximum ?? 0) - 1e-9);
			expect(outer.minimum ?? 0).toBeLessThanOrEqual((inner.minimum ?? 0) + 1e-9);
		}),
		{ numRuns: 30 }
	);
});

it('refuses an open or crossed window, and a certainty', () => {
	expect(() => edgeRule(line(0.9), {}, PROMISE)).toThrow(OutsideDomainError);
	expect(() => edgeRule(line(0.9), { lowest: 2, highest: 1 }, PROMISE)).toThrow(
		'a highest above 2, got 1'
	);
	const certain = { content: 1, confidence: 0.95 };
	expect(() => oneSidedRegressionFactor(line(0.9), 0, certain)).toThrow(OutsideDomainError);
	expect(() => twoSidedRegressionFactor(line(0.9), 0, certain)).toThrow(OutsideDomainError);
});
