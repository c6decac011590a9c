import { chiSquareQuantile, chiSquareUpperTail } from './chiSquare';
import { coveringHalfWidth } from './coveringHalfWidth';
import { findRoot } from './findRoot';
import { panelRule } from './gaussLegendre';
import { normalDensity } from './normalDistribution';
import { checkPromise, type TolerancePromise } from './toleranceFactor';

/** What is known of the centre and of the spread of an interval. */
export interface CentreAndSpread {
	/** Variance of the estimated centre, in units of the population's: 1/n for a sample. */
	readonly centreVariance: number;
	/** Degrees of freedom of the estimated spread: n − 1 for a sample. */
	readonly degrees: number;
}

/** Cuts of the integral over the error of the centre, in its own deviations. */
const CUTS = [0, 0.5, 1, 1.5, 2, 3, 4, 5.5, 7.5, 10];

/**
 * The exact factor k of centre ± k·s with the content between both ends:
 * γ = 2∫₀^∞ φ(x/d)/d · P(χ²_ν ≥ ν r(x)²/k²) dx, r(x) from {@link coveringHalfWidth}. It serves a
 * sample (d² = 1/n) and a point on a fitted line alike.
 *
 * Source: Odeh and Owen 1980; Krishnamoorthy and Mathew 2009, section 2.3.
 */
export function twoSidedFactor(
	{ centreVariance, degrees }: CentreAndSpread,
	{ content, confidence }: TolerancePromise
): number {
	const d = Math.sqrt(centreVariance);
	const { nodes, weights } = panelRule(CUTS);
	const squares = nodes.map((node) => coveringHalfWidth(d * node, content) ** 2);
	const densities = nodes.map((node, i) => 2 * normalDensity(node) * weights[i]!);
	const excess = (logFactor: number) => {
		const square = Math.exp(2 * logFactor);
		let reached = 0;
		for (let i = 0; i < squares.length; i++)
			reached += densities[i]! * chiSquareUpperTail((degrees * squares[i]!) / square, degrees);
		return reached - confidence;
	};
	const least = chiSquareQuantile(1 - confidence, degrees);
	const guess = Math.log(coveringHalfWidth(d, content) * Math.sqrt(degrees / least));
	let lower = guess - 0.01;
	let upper = guess + 0.01;
	for (let step = 0.02; excess(lower) > 0; step *= 2) [lower, upper] = [lower - step, lower];
	for (let step = 0.02; excess(upper) < 0; step *= 2) [lower, upper] = [upper, upper + step];
	return Math.exp(findRoot(excess, lower, upper, 1e-14));
}

/**
 * k₂: mean ± k₂·s holds at least the content of a normal population between both ends, with the
 * confidence. It bounds the sum of both tails, not each of them. Exact; Howe's well-known
 * approximation is smaller than this from 43 devices on and was not used.
 *
 * @throws {SampleTooSmallError} for fewer than two devices
 * @throws {OutsideDomainError} unless content and confidence lie between 0 and 1
 * @example twoSidedToleranceFactor(30, { content: 0.95, confidence: 0.95 }) // 2.55489281
 */
export function twoSidedToleranceFactor(sampleSize: number, promise: TolerancePromise): number {
	checkPromise('twoSidedToleranceFactor', sampleSize, promise);
	return twoSidedFactor({ centreVariance: 1 / sampleSize, degrees: sampleSize - 1 }, promise);
}
