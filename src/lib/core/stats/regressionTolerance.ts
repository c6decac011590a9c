import { OutsideDomainError } from './errors';
import { noncentralTQuantile } from './noncentralT';
import { normalQuantile } from './normalQuantile';
import type { RegressionLine } from './regressionLine';
import { requireProbability } from './requireProbability';
import type { TolerancePromise } from './toleranceFactor';
import { twoSidedFactor } from './twoSidedFactor';

/** d²: variance of the line's height at x, in units of the residual variance. */
export function heightVariance(line: RegressionLine, x: number): number {
	return 1 / line.sampleSize + (x - line.meanX) ** 2 / line.sumOfSquaresX;
}

/**
 * k of height + k·s above the content of all y at this x: d·t′(γ; n−2, z_P/d).
 *
 * Source: Krishnamoorthy and Mathew 2009, section 3.2.
 *
 * @throws {OutsideDomainError} unless content and confidence lie between 0 and 1
 */
export function oneSidedRegressionFactor(
	line: RegressionLine,
	x: number,
	{ content, confidence }: TolerancePromise
): number {
	requireProbability('oneSidedRegressionFactor', 'a content', content);
	requireProbability('oneSidedRegressionFactor', 'a confidence', confidence);
	const d = Math.sqrt(heightVariance(line, x));
	return d * noncentralTQuantile(confidence, line.sampleSize - 2, normalQuantile(content) / d);
}

/** k of height ± k·s with the content of all y at this x between both ends; exact. */
export function twoSidedRegressionFactor(
	line: RegressionLine,
	x: number,
	promise: TolerancePromise
): number {
	requireProbability('twoSidedRegressionFactor', 'a content', promise.content);
	requireProbability('twoSidedRegressionFactor', 'a confidence', promise.confidence);
	const spread = { centreVariance: heightVariance(line, x), degrees: line.sampleSize - 2 };
	return twoSidedFactor(spread, promise);
}

/** Test limits at the tested condition, either or both. */
export interface TestWindow {
	readonly lowest?: number;
	readonly highest?: number;
}

/** Limits at the other condition; `undefined` where no edge of the window holds them. */
export interface ScreenedLimits {
	readonly minimum: number | undefined;
	readonly maximum: number | undefined;
	/** Edge of the window each rests on, and its factor. */
	readonly minimumEdge: number | undefined;
	readonly maximumEdge: number | undefined;
	readonly minimumFactor: number | undefined;
	readonly maximumFactor: number | undefined;
}

/**
 * What passing a test at one condition guarantees at another: the regression tolerance bound taken
 * at the edge of the window itself. It holds for any distribution of x inside the window, because a
 * device at the edge is the worst that passes. For a falling line the edges change places. Each
 * limit keeps the promise on its own; share the confidence when both are promised.
 *
 * Conditions that the caller checks: the line is straight and evenly spread up to the edge, the
 * edge lies inside the characterized range, lot effects are in the residuals.
 *
 * @throws {OutsideDomainError} for a window without an edge or with its edges crossed
 */
export function edgeRule(
	line: RegressionLine,
	{ lowest, highest }: TestWindow,
	promise: TolerancePromise
): ScreenedLimits {
	if (lowest === undefined && highest === undefined)
		throw new OutsideDomainError('edgeRule', 'at least 1 test limit', 0);
	if (lowest !== undefined && highest !== undefined && !(lowest < highest))
		throw new OutsideDomainError('edgeRule', `a highest above ${lowest}`, highest);
	const [minimumEdge, maximumEdge] = line.slope >= 0 ? [lowest, highest] : [highest, lowest];
	const factorAt = (x: number | undefined) =>
		x === undefined ? undefined : oneSidedRegressionFactor(line, x, promise);
	const limitAt = (x: number | undefined, factor: number | undefined, side: 1 | -1) =>
		x === undefined || factor === undefined
			? undefined
			: line.intercept + line.slope * x + side * factor * line.residualDeviation;
	const minimumFactor = factorAt(minimumEdge);
	const maximumFactor = factorAt(maximumEdge);
	return {
		minimum: limitAt(minimumEdge, minimumFactor, -1),
		maximum: limitAt(maximumEdge, maximumFactor, 1),
		minimumEdge,
		maximumEdge,
		minimumFactor,
		maximumFactor
	};
}
