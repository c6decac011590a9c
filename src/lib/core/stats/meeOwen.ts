import { chiSquareQuantile } from './chiSquare';
import { coveringHalfWidth } from './coveringHalfWidth';
import { OutsideDomainError } from './errors';
import { fQuantile } from './fDistribution';
import type { LotStrata } from './lotStrata';
import { noncentralTQuantile } from './noncentralT';
import { normalLowerTail } from './normalDistribution';
import { normalQuantile } from './normalQuantile';
import type { TolerancePromise } from './toleranceFactor';

/** The intermediate numbers of a Mee–Owen limit. */
export interface MeeOwenBasis {
	/** Upper bound of σ_L²/σ_E². */
	readonly varianceRatio: number;
	/** Satterthwaite's degrees of freedom of the total deviation. */
	readonly degrees: number;
	/** Effective number of devices behind the mean. */
	readonly effectiveSampleSize: number;
	/** The estimated total deviation S. */
	readonly deviation: number;
}

/** Confidence of the bound on the variance ratio, tabulated by Mee and Owen for three confidences. */
const RATIO_CONFIDENCE = [
	[0.9, 0.85],
	[0.95, 0.905],
	[0.99, 0.975]
] as const;

/** Between and beyond the tabulated confidences: linear in the normal quantiles. */
function ratioConfidence(confidence: number): number {
	const z = normalQuantile(confidence);
	const [first, second, third] = RATIO_CONFIDENCE;
	const [from, to] = confidence <= second[0] ? [first, second] : [second, third];
	const [x1, x2, y1, y2] = [from[0], to[0], from[1], to[1]].map(normalQuantile) as [
		number,
		number,
		number,
		number
	];
	return normalLowerTail(y1 + ((z - x1) * (y2 - y1)) / (x2 - x1));
}

/**
 * The numbers behind a Mee–Owen limit for lots and devices: an upper bound of the variance ratio
 * turns the total deviation into one with known degrees of freedom.
 *
 * Source: Mee and Owen 1983, Journal of the American Statistical Association 78.
 *
 * @throws {OutsideDomainError} for more strata than lots and devices
 */
export function meeOwenBasis(
	{ lots, effectiveSize, strata }: LotStrata,
	confidence: number
): MeeOwenBasis {
	const [lotStratum, deviceStratum] = strata;
	if (strata.length !== 2 || !lotStratum || !deviceStratum)
		throw new OutsideDomainError('meeOwenBasis', 'lots and devices only', strata.length);
	const meanSquareRatio = (effectiveSize * lotStratum.variance) / deviceStratum.variance;
	const f = fQuantile(ratioConfidence(confidence), {
		numerator: deviceStratum.degrees,
		denominator: lotStratum.degrees
	});
	const varianceRatio = Math.max(0, (f * meanSquareRatio - 1) / effectiveSize);
	const degrees =
		(varianceRatio + 1) ** 2 /
		((varianceRatio + 1 / effectiveSize) ** 2 / lotStratum.degrees +
			(1 - 1 / effectiveSize) / (lots * effectiveSize));
	const devices = lots * effectiveSize;
	return {
		varianceRatio,
		degrees,
		effectiveSampleSize: (devices * (varianceRatio + 1)) / (effectiveSize * varianceRatio + 1),
		deviation: Math.sqrt(lotStratum.variance + deviceStratum.share * deviceStratum.variance)
	};
}

/**
 * Distance of a one-sided limit from the mean for future lots: k·S, k a noncentral t factor with the
 * degrees of {@link meeOwenBasis}. The second route to {@link lotsToleranceMargin}; the two agree to
 * a few per cent of the margin, not exactly, because both approximate.
 */
export function meeOwenMargin(
	strata: LotStrata,
	{ content, confidence }: TolerancePromise
): number {
	const { degrees, effectiveSampleSize, deviation } = meeOwenBasis(strata, confidence);
	const root = Math.sqrt(effectiveSampleSize);
	const noncentrality = normalQuantile(content) * root;
	return (noncentralTQuantile(confidence, degrees, noncentrality) / root) * deviation;
}

/**
 * Half the distance between two limits with the content between both, for future lots.
 *
 * Source: Mee 1984, Technometrics 26.
 */
export function meeOwenHalfWidth(
	strata: LotStrata,
	{ content, confidence }: TolerancePromise
): number {
	const { degrees, effectiveSampleSize, deviation } = meeOwenBasis(strata, confidence);
	const reach = coveringHalfWidth(1 / Math.sqrt(effectiveSampleSize), content);
	const spread = Math.sqrt(degrees / chiSquareQuantile(1 - confidence, degrees));
	return reach * spread * deviation;
}
