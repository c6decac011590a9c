import { chiSquareUpperTail } from './chiSquare';
import type { LotStrata, Stratum } from './lotStrata';
import { normalQuantile } from './normalQuantile';
import { requireProbability } from './requireProbability';
import { solveNear } from './solveNear';
import { tabulatedLowerTail } from './tabulatedNormal';
import type { TolerancePromise } from './toleranceFactor';
import {
	deviationOf,
	leastSmoothing,
	NEGLIGIBLE,
	spreadOf,
	splitStrata,
	sumOfSpreads,
	tailVariance,
	totalVariance,
	type VarianceSpread
} from './varianceSpread';

/** Spacing of the quadrature over the lots, in deviations: their few degrees matter most. */
const LOT_STEP = 0.3;

/** Where the others alone use up a half-width, the confidence ends in an edge as sharp as this. */
const EDGE = 0.1;

/** A first solution on a rule this much wider tells where to look with the fine one. */
const SCOUT = 2;

/**
 * How far a one-sided limit lies from the mean, so that with the confidence at least the content of
 * the devices of *future lots* is on the right side: the γ-quantile of the generalized pivotal
 * quantity Z·√(V_L/a) + z_P·√(V_L + …), each V being SS/χ². Conditional on the V's it is normal, so
 * its distribution is an integral over two (lots) or three (lots, wafers) chi-squares, done here by
 * deterministic quadrature; nothing is simulated. 0 when nothing varies.
 *
 * Source: Krishnamoorthy and Mathew 2004, Technometrics 46; 2009, chapters 4 and 5.
 *
 * @throws {OutsideDomainError} unless content and confidence lie between 0 and 1
 */
export function lotsToleranceMargin(strata: LotStrata, promise: TolerancePromise): number {
	requireProbability('lotsToleranceMargin', 'a content', promise.content);
	requireProbability('lotsToleranceMargin', 'a confidence', promise.confidence);
	const scale = Math.sqrt(totalVariance(strata));
	if (scale === 0) return 0;
	return solve(marginConfidence, strata, normalQuantile(promise.content), promise, scale);
}

/**
 * The generalized confidence that a margin keeps, as a function of the margin:
 * {@link lotsToleranceMargin} the other way round. A simulation needs no more than this.
 *
 * @throws {OutsideDomainError} unless the content lies between 0 and 1
 */
export function lotsMarginConfidence(
	strata: LotStrata,
	content: number
): (margin: number) => number {
	requireProbability('lotsMarginConfidence', 'a content', content);
	return marginConfidence(strata, normalQuantile(content), 1);
}

/**
 * Half the distance between limits that hold the content *between both* for future lots: the
 * γ-quantile of z·√(V_L(1 + 1/a) + …), z the quantile of (1 + P)/2. The innermost integral, over the
 * stratum that reaches furthest, is a chi-square tail.
 *
 * Source: Liao, Lin and Iyer 2005, Technometrics 47; Krishnamoorthy and Mathew 2009, section 4.5.
 *
 * @throws {OutsideDomainError} unless content and confidence lie between 0 and 1
 */
export function lotsToleranceHalfWidth(strata: LotStrata, promise: TolerancePromise): number {
	requireProbability('lotsToleranceHalfWidth', 'a content', promise.content);
	requireProbability('lotsToleranceHalfWidth', 'a confidence', promise.confidence);
	const scale = Math.sqrt(totalVariance(strata));
	if (scale === 0) return 0;
	const z = normalQuantile((1 + promise.content) / 2);
	return solve(halfWidthConfidence, strata, z, promise, scale);
}

/**
 * The generalized confidence that a half-width keeps, as a function of the half-width:
 * {@link lotsToleranceHalfWidth} the other way round.
 *
 * @throws {OutsideDomainError} unless the content lies between 0 and 1
 */
export function lotsHalfWidthConfidence(
	strata: LotStrata,
	content: number
): (halfWidth: number) => number {
	requireProbability('lotsHalfWidthConfidence', 'a content', content);
	return halfWidthConfidence(strata, normalQuantile((1 + content) / 2), 1);
}

/** Confidence as a function of the reach of a limit, by a quadrature with steps widened so much. */
type ConfidenceOf = (strata: LotStrata, z: number, widening: number) => (reach: number) => number;

function solve(
	confidenceOf: ConfidenceOf,
	strata: LotStrata,
	z: number,
	{ confidence }: TolerancePromise,
	scale: number
): number {
	const fine = confidenceOf(strata, z, 1);
	const wide = confidenceOf(strata, z, SCOUT);
	/** Steps this wide don't quite add up to 1; what they promise in the end makes up for it. */
	const whole = wide(Infinity);
	return solveNear(
		(reach) => fine(reach) - confidence,
		(reach) => wide(reach) / whole - confidence,
		Math.abs(z) * scale,
		scale
	);
}

function marginConfidence(strata: LotStrata, z: number, widening: number) {
	const [lots, within] = splitStrata(strata);
	const between = spreadOf(lots, widening * LOT_STEP);
	/** An error of the mean moves a limit as an error of 2√(V_L/a)·√V/z in the variance would. */
	const perError = Math.sqrt(totalVariance(strata)) / Math.abs(z);
	const smoothing = Math.sqrt(lots.variance / strata.lots) * perError;
	const furthest = Math.abs(z) * Math.sqrt(tailVariance(strata.strata));
	const inTail = (2 * Math.sqrt(lots.variance / strata.lots)) / furthest;
	const inside = sumOfSpreads(within, { central: smoothing, inTail }, widening);
	/** Where lots are so alike that the quadrature can't follow, the mean is taken for a little less sure. */
	const least = widening * leastSmoothing(within);
	const surest = Math.max(0, least ** 2 - smoothing ** 2) / perError ** 2;

	const ofMean = between.values.map((lotVariance) => lotVariance / strata.lots + surest);
	const pairs = pairNodes(between, inside, { z, ofMean });
	return (margin: number) => weighPairs(pairs, margin);
}

/** Pairs of nodes: how far a limit must reach there, how sure the mean is, and how much it counts. */
interface Pairs {
	/** z·S */
	readonly reach: Float64Array;
	/** √(a/V_L) */
	readonly inverse: Float64Array;
	readonly weight: Float64Array;
}

function pairNodes(
	between: VarianceSpread,
	inside: VarianceSpread,
	{ z, ofMean }: { readonly z: number; readonly ofMean: Float64Array }
): Pairs {
	const size = countPairs(between.weights, inside.weights);
	const reach = new Float64Array(size);
	const inverse = new Float64Array(size);
	const weight = new Float64Array(size);
	let count = 0;
	for (let i = 0; i < between.values.length; i++) {
		const [value, ofLots] = [between.values[i]!, between.weights[i]!];
		const inverseHere = 1 / Math.sqrt(ofMean[i]! + Number.MIN_VALUE);
		for (let j = 0; j < inside.values.length; j++) {
			const product = ofLots * inside.weights[j]!;
			if (product < NEGLIGIBLE) continue;
			reach[count] = z * Math.sqrt(value + inside.values[j]!);
			inverse[count] = inverseHere;
			weight[count] = product;
			count++;
		}
	}
	return { reach, inverse, weight };
}

function countPairs(first: Float64Array, second: Float64Array): number {
	let count = 0;
	for (let i = 0; i < first.length; i++)
		for (let j = 0; j < second.length; j++) if (first[i]! * second[j]! >= NEGLIGIBLE) count++;
	return count;
}

function weighPairs({ reach, inverse, weight }: Pairs, margin: number): number {
	let reached = 0;
	for (let i = 0; i < reach.length; i++)
		reached += weight[i]! * tabulatedLowerTail((margin - reach[i]!) * inverse[i]!);
	return reached;
}

function halfWidthConfidence(strata: LotStrata, z: number, widening: number) {
	const [lots, within] = splitStrata(strata);
	const ofBoth = { ...lots, share: 1 + 1 / strata.lots };
	const all = [ofBoth, ...within];
	const innermost = furthestOf(all);
	const inTail = Math.min(EDGE, deviationOf(innermost) / tailVariance(all));
	const outside = sumOfSpreads(
		all.filter((stratum) => stratum !== innermost),
		{ central: deviationOf(innermost) / 2.5, inTail },
		widening
	);
	const sumOfSquares = innermost.share * innermost.variance * innermost.degrees;
	return (halfWidth: number) => {
		const variance = (halfWidth / z) ** 2;
		let reached = 0;
		for (let i = 0; i < outside.values.length; i++) {
			const room = variance - outside.values[i]!;
			if (room <= 0) continue;
			reached += outside.weights[i]! * chiSquareUpperTail(sumOfSquares / room, innermost.degrees);
		}
		return reached;
	};
}

/** The stratum whose variance may be the largest. */
function furthestOf(strata: readonly Stratum[]): Stratum {
	return strata.reduce((a, b) => (tailVariance([b]) > tailVariance([a]) ? b : a));
}
