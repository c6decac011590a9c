import { chiSquareUpperTail } from './chiSquare';
import { OutsideDomainError } from './errors';
import { bracketIncreasing, findRoot } from './findRoot';
import { logChiSquareRule } from './logChiSquareRule';
import type { LotStrata, Stratum } from './lotStrata';
import { normalLowerTail } from './normalDistribution';
import { normalQuantile } from './normalQuantile';
import { requireProbability } from './requireProbability';
import type { TolerancePromise } from './toleranceFactor';

/** Spacing of the quadrature over the lots, in deviations: their few degrees matter most. */
const LOT_STEP = 0.3;

/** Bounds of the spacing within lots; the finest is for lots that hardly differ. */
const WIDEST_STEP = 0.9;
const FINEST_STEP = 0.08;

/** A first solution on a rule this much wider tells where to look with the fine one. */
const SCOUT = 2;

/** Products of weights below this are left out of the sum. */
const NEGLIGIBLE = 1e-10;

/** Deviations beyond which a normal probability is 0 or 1 for this purpose. */
const CERTAIN = 7;

/** A discrete stand-in for the distribution of a variance: values and their probabilities. */
interface Spread {
	readonly values: Float64Array;
	readonly weights: Float64Array;
}

/** Generalized variance of one stratum: share · SS/U over the distribution of U. */
function spreadOf({ variance, degrees, share }: Stratum, step: number): Spread {
	const { nodes, weights } = logChiSquareRule(degrees, step);
	return { values: nodes.map((u) => (share * variance * degrees) / u), weights };
}

/** Distribution of the sum of two independent variances. */
function sumOf(first: Spread, second: Spread): Spread {
	const values: number[] = [];
	const weights: number[] = [];
	for (let i = 0; i < first.values.length; i++)
		for (let j = 0; j < second.values.length; j++) {
			const weight = first.weights[i]! * second.weights[j]!;
			if (weight < NEGLIGIBLE) continue;
			values.push(first.values[i]! + second.values[j]!);
			weights.push(weight);
		}
	return { values: Float64Array.from(values), weights: Float64Array.from(weights) };
}

/**
 * Everything below the lot: wafers and devices together. What the lots do to a limit smooths the
 * integrand over the rest; the less they do, the finer the rest must be taken.
 */
function spreadWithinLots(strata: readonly Stratum[], smoothing: number, widening: number): Spread {
	let smooth = smoothing;
	const spreads = strata.map((stratum) => {
		const deviation = Math.sqrt(2 / stratum.degrees) * stratum.share * stratum.variance;
		const widest = stratum.degrees > 30 ? WIDEST_STEP : WIDEST_STEP / 2;
		const step = deviation > 0 ? Math.min(widest, smooth / deviation) : widest;
		smooth = Math.hypot(smooth, deviation);
		return spreadOf(stratum, widening * Math.max(FINEST_STEP, step));
	});
	return spreads.reduce(sumOf);
}

function split(strata: LotStrata): readonly [Stratum, readonly Stratum[]] {
	const [lots, ...within] = strata.strata;
	if (!lots || within.length === 0)
		throw new OutsideDomainError('lots tolerance limit', 'at least 2 strata', strata.strata.length);
	return [lots, within];
}

function total(strata: LotStrata): number {
	return strata.strata.reduce((sum, { variance, share }) => sum + variance * share, 0);
}

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
	const scale = Math.sqrt(total(strata));
	if (scale === 0) return 0;
	const z = normalQuantile(promise.content);
	const scout = solveFrom(marginExcess(strata, z, promise.confidence, SCOUT), z * scale, scale);
	return solveFrom(marginExcess(strata, z, promise.confidence, 1), scout, scale / 1000);
}

/** Confidence of a margin, less the confidence asked for. */
function marginExcess(
	strata: LotStrata,
	z: number,
	confidence: number,
	widening: number
): (margin: number) => number {
	const [lots, within] = split(strata);
	const between = spreadOf(lots, widening * LOT_STEP);
	/** An error of the mean moves a limit as an error of 2√(V_L/a)·√V/z in the variance would. */
	const smoothing = Math.sqrt((lots.variance / strata.lots) * total(strata)) / Math.abs(z);
	const inside = spreadWithinLots(within, smoothing, widening);

	/** z·S and √(a/V_L) of every pair of nodes, and the weight of the pair. */
	const size = between.values.length * inside.values.length;
	const reach = new Float64Array(size);
	const inverse = new Float64Array(size);
	const weight = new Float64Array(size);
	let count = 0;
	for (let i = 0; i < between.values.length; i++) {
		const lotVariance = between.values[i]!;
		const ofMean = 1 / Math.sqrt(lotVariance / strata.lots + Number.MIN_VALUE);
		for (let j = 0; j < inside.values.length; j++) {
			const product = between.weights[i]! * inside.weights[j]!;
			if (product < NEGLIGIBLE) continue;
			reach[count] = z * Math.sqrt(lotVariance + inside.values[j]!);
			inverse[count] = ofMean;
			weight[count] = product;
			count++;
		}
	}
	return (margin) => {
		let reached = 0;
		for (let i = 0; i < count; i++) {
			const x = (margin - reach[i]!) * inverse[i]!;
			if (x > CERTAIN) reached += weight[i]!;
			else if (x > -CERTAIN) reached += weight[i]! * normalLowerTail(x);
		}
		return reached - confidence;
	};
}

/**
 * Half the distance between limits that hold the content *between both* for future lots: the
 * γ-quantile of z·√(V_L(1 + 1/a) + …), z the quantile of (1 + P)/2. The innermost integral, over the
 * lots, is a chi-square tail.
 *
 * Source: Liao, Lin and Iyer 2005, Technometrics 47; Krishnamoorthy and Mathew 2009, section 4.5.
 *
 * @throws {OutsideDomainError} unless content and confidence lie between 0 and 1
 */
export function lotsToleranceHalfWidth(strata: LotStrata, promise: TolerancePromise): number {
	requireProbability('lotsToleranceHalfWidth', 'a content', promise.content);
	requireProbability('lotsToleranceHalfWidth', 'a confidence', promise.confidence);
	const scale = Math.sqrt(total(strata));
	if (scale === 0) return 0;
	const z = normalQuantile((1 + promise.content) / 2);
	const scout = solveFrom(halfWidthExcess(strata, z, promise.confidence, SCOUT), z * scale, scale);
	return solveFrom(halfWidthExcess(strata, z, promise.confidence, 1), scout, scale / 1000);
}

/** Confidence of a half-width, less the confidence asked for. */
function halfWidthExcess(
	strata: LotStrata,
	z: number,
	confidence: number,
	widening: number
): (halfWidth: number) => number {
	const [lots, within] = split(strata);
	const inside = spreadWithinLots(within, lots.variance / 2, widening);
	const sumOfSquares = lots.variance * lots.degrees * (1 + 1 / strata.lots);
	return (halfWidth) => {
		const variance = (halfWidth / z) ** 2;
		let reached = 0;
		for (let i = 0; i < inside.values.length; i++) {
			const room = variance - inside.values[i]!;
			if (room <= 0) continue;
			reached += inside.weights[i]! * chiSquareUpperTail(sumOfSquares / room, lots.degrees);
		}
		return reached - confidence;
	};
}

/** Brackets outwards from a guess in steps that grow, then solves. */
function solveFrom(excess: (x: number) => number, guess: number, firstStep: number): number {
	const [lower, upper] = bracketIncreasing(excess, guess, firstStep);
	return findRoot(excess, lower, upper, 1e-9);
}
